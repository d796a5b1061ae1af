// Development and tests only: on Node 20 `--import tsx` does not register itself inside a worker thread.
import { register } from 'tsx/esm/api';

register();
