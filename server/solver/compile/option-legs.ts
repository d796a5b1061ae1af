import type { ContactModel } from '../../../shared/schedule/model.ts';
import type { Option } from './options.ts';

export type Legs = Pick<ContactModel, 'passId' | 'faceId' | 'receive' | 'transmit'>;

/** An option in the shape that scores are computed on. */
export const legsOf = (option: Option): Legs => ({
  passId: option.pass.id,
  faceId: option.faceId,
  receive: { channelId: '', fromMs: option.receive.fromMs, toMs: option.receive.toMs },
  transmit: option.transmit && {
    channelId: '',
    fromMs: option.transmit.fromMs,
    toMs: option.transmit.toMs,
  },
});
