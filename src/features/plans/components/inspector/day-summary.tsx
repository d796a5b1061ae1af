import { Icon } from '../../../../components/icon.tsx';
import { MissionMark } from '../../../../components/mission-mark.tsx';
import { Facts } from '../../../../components/facts.tsx';
import { decimals } from '../../../../lib/format-number.ts';
import { dateClock } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { legInterval } from '../../model/plan-legs.ts';

/** While nothing is selected: the day in numbers, what each mission is short of, and warnings. */
export function DaySummary() {
  const { plan } = usePlanDesk();
  const { score } = plan;
  return (
    <section
      aria-labelledby="day"
      className="h-full overflow-y-auto bg-surface px-4.5 py-3"
      tabIndex={0}
    >
      <h2 id="day" className="text-section font-semibold">
        The day
      </h2>
      <Facts
        className="mt-1"
        rows={[
          ['Contacts of passes', `${score.contacts} of ${score.passes}`],
          ['Contact time', `${decimals(score.minutes, 0)} min`],
          ['Limit of the day', `${decimals(plan.limitOfDayDb, 1)} dB`],
          ['Signatures due', `${dateClock(Date.parse(plan.cutOffUtc))} UTC`],
          ...(plan.submittedBy ? [['Submitted by', plan.submittedBy] as const] : []),
        ]}
      />
      <Requirements />
      <Warnings />
    </section>
  );
}

function Requirements() {
  const { plan, missions } = usePlanDesk();
  const short = plan.requirements.filter(({ met }) => !met);
  const met = plan.requirements.length - short.length;
  return (
    <section aria-label="Requirements" className="mt-4">
      <h3 className="mb-1 flex items-baseline gap-2 font-semibold">
        Requirements
        <span className="font-normal text-ink-muted">
          {met} met, {short.length} short
        </span>
      </h3>
      <ul className="figures">
        {short.map((line, index) => (
          <li key={index} className="flex items-start gap-2 border-t border-line-soft py-1.5">
            <MissionMark series={missions.series(line.missionId)} size={8} className="mt-1" />
            <span className="min-w-0 flex-1">
              {line.label}
              {line.note && <span className="block text-caption text-ink-muted">{line.note}</span>}
            </span>
            <span className="text-right whitespace-nowrap">
              <strong className="font-semibold text-danger-text">
                {decimals(line.given, line.unit === 'contacts' ? 0 : 1)}
              </strong>
              <span className="text-ink-muted">
                {' '}
                of {decimals(line.asked, line.unit === 'contacts' ? 0 : 1)} {line.unit}
              </span>
            </span>
          </li>
        ))}
      </ul>
      {short.length === 0 && <p className="text-ink-muted">Every requirement is met.</p>}
    </section>
  );
}

const WORDS: Record<string, string> = { 'old-element-set': 'Old element set' };
const MOST = 40;

function Warnings() {
  const { plan, contacts } = usePlanDesk();
  const { showContact } = usePlanView();
  const codes = [...new Set(plan.warnings.map(({ code }) => code))];
  if (plan.warnings.length === 0) return null;
  return (
    <section aria-label="Warnings" className="mt-4">
      <h3 className="mb-1 font-semibold">
        Warnings{' '}
        <span className="font-normal text-ink-muted">
          {plan.warnings.length}, none of them forbids
        </span>
      </h3>
      {codes.map((code) => {
        const list = plan.warnings.filter((warning) => warning.code === code);
        return (
          <details key={code} className="border-t border-line-soft py-1.5">
            <summary className="flex min-h-6 items-center gap-2 text-warn-text">
              <Icon name="warning" size={14} />
              <span className="font-semibold">{WORDS[code] ?? code.replaceAll('-', ' ')}</span>
              <span className="ml-auto text-ink-muted">{list.length}</span>
            </summary>
            <ul className="mt-1">
              {list.slice(0, MOST).map((warning, index) => {
                const contact = contacts.get(warning.contactIds[0] ?? '');
                return (
                  <li key={index}>
                    <button
                      type="button"
                      className="min-h-6 rounded-mark text-left hover:underline"
                      disabled={!contact}
                      onClick={() =>
                        contact && showContact(contact.id, legInterval(contact.receive))
                      }
                    >
                      {warning.message}
                    </button>
                  </li>
                );
              })}
            </ul>
          </details>
        );
      })}
    </section>
  );
}
