import { z } from 'zod';

// zod compiles parsers with `new Function` where it may; our Content-Security-Policy forbids that, and the try
// alone would be reported as a violation.
z.config({ jitless: true });
