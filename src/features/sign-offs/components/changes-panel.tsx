import { useQuery } from '@tanstack/react-query';
import { isHidden, type AnyContact, type Plan } from '../../../../shared/schemas/plan.ts';
import { Icon, type IconName } from '../../../components/icon.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { clockSpan } from '../../../lib/format-time.ts';
import { planQueries } from '../../../queries/plan-queries.ts';

interface Props {
  plan: Plan;
  missionId: string;
}

const words = (contact: AnyContact): string => {
  const span = clockSpan(Date.parse(contact.receive.fromUtc), Date.parse(contact.receive.toUtc));
  return isHidden(contact) ? span : `${contact.satelliteName}, ${span}`;
};

/** What differs for this mission from the revision before. */
export function ChangesPanel({ plan, missionId }: Props) {
  const changes = useQuery({ ...planQueries.changes(plan.id), enabled: plan.revision > 1 });
  if (plan.revision === 1) return null;
  const own = (contact: AnyContact): boolean =>
    !isHidden(contact) && contact.missionId === missionId;
  return (
    <Panel title="Since the revision before">
      <QueryView query={changes} what="The changes">
        {({ added, removed, changed }) => {
          const rows: [IconName, string][] = [
            ...added.filter(own).map((one): [IconName, string] => ['add', words(one)]),
            ...removed.filter(own).map((one): [IconName, string] => ['minus', words(one)]),
            ...changed
              .filter(({ after }) => own(after))
              .map(({ before, after }): [IconName, string] => [
                'move',
                `${words(before)} is now ${words(after)}`,
              ]),
          ];
          if (rows.length === 0)
            return <p className="text-table text-ink-muted">Nothing of yours has changed.</p>;
          return (
            <ul className="flex flex-col gap-1.5 text-table">
              {rows.map(([icon, text]) => (
                <li key={`${icon} ${text}`} className="flex items-start gap-2">
                  <Icon name={icon} size={14} className="mt-0.5 text-info-mark" />
                  {text}
                </li>
              ))}
            </ul>
          );
        }}
      </QueryView>
    </Panel>
  );
}
