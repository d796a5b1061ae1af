import type { OpenPass } from '../../../../shared/schemas/plan.ts';
import type { IconName } from '../../../components/icon.tsx';
import type { Tone } from '../../../components/chip.tsx';

interface ReasonLook {
  icon: IconName;
  word: string;
  /** Two words for a narrow block. */
  short: string;
}

const LOOKS: Record<string, ReasonLook> = {
  free: { icon: 'free', word: 'Free', short: 'free' },
  'transmit-limit': { icon: 'transmit', word: 'Transmit limit', short: 'no uplink' },
  'beams-too-close': { icon: 'beamsClose', word: 'Beams too close', short: 'too close' },
  'channel-busy': { icon: 'channelBusy', word: 'Channel busy', short: 'busy' },
  'channel-unfit': { icon: 'hash', word: 'Channel unfit', short: 'unfit' },
  closure: { icon: 'closure', word: 'Closure', short: 'closed' },
  'too-short': { icon: 'tooShort', word: 'Too short', short: 'too short' },
  'outside-window': { icon: 'outside', word: 'Outside window', short: 'outside' },
  'hard-end': { icon: 'outside', word: 'Beyond the hard end', short: 'hard end' },
  duplicate: { icon: 'duplicate', word: 'Served already', short: 'served' },
  'keep-out': { icon: 'keepOut', word: 'Keep-out', short: 'keep-out' },
};

const FALLBACK: Record<OpenPass['standing'], ReasonLook> = {
  free: { icon: 'free', word: 'Free', short: 'free' },
  stopped: { icon: 'partly', word: 'Stopped by a rule', short: 'stopped' },
  unusable: { icon: 'outside', word: 'No usable window', short: 'outside' },
};

export const lookOfRule = (rule: string): ReasonLook =>
  LOOKS[rule] ?? { icon: 'warning', word: rule.replaceAll('-', ' '), short: rule };

export const lookOfPass = (pass: OpenPass): ReasonLook => {
  const first = pass.reasons[0];
  return pass.standing !== 'free' && first ? lookOfRule(first.rule) : FALLBACK[pass.standing];
};

export const toneOfPass = (pass: OpenPass): Tone =>
  (({ free: 'info', stopped: 'warn', unusable: 'neutral' }) as const)[pass.standing];
