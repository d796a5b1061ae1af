import type { Violation } from '../../../../shared/schemas/problem.ts';
import { ToneWord } from '../../../components/chip.tsx';
import { clockSeconds } from '../../../lib/format-time.ts';
import { lookOfRule } from '../model/reasons.ts';

/** Every broken rule by name, with the number that decides. */
export function ViolationList({ violations }: { violations: readonly Violation[] }) {
  return (
    <ul className="flex flex-col gap-2">
      {violations.map((violation, index) => {
        const { icon, word } = lookOfRule(violation.rule);
        return (
          <li key={index} className="border-t border-line-soft pt-2 first:border-t-0 first:pt-0">
            <div className="flex items-baseline justify-between gap-3">
              <ToneWord tone="danger" icon={icon}>
                {word}
              </ToneWord>
              <span className="figures text-caption text-ink-muted">
                {clockSeconds(Date.parse(violation.fromUtc))}–
                {clockSeconds(Date.parse(violation.toUtc))} UTC
              </span>
            </div>
            <p className="mt-0.5">{violation.message}</p>
          </li>
        );
      })}
    </ul>
  );
}
