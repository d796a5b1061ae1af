import { useMemo, useState } from 'react';
import { isHidden, type Contact, type Plan } from '../../../../shared/schemas/plan.ts';
import { Panel } from '../../../components/panel.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { counted } from '../../../lib/format-number.ts';
import { AskedTable } from './asked-table.tsx';
import { ChangesPanel } from './changes-panel.tsx';
import { Decision } from './decision.tsx';
import { DaySky } from './day-sky.tsx';
import { DayStrip } from './day-strip.tsx';
import { OwnContacts } from './own-contacts.tsx';

interface Props {
  plan: Plan;
  missionId: string;
}

/** What a mission asked against what the plan gives, its contacts, and the decision; two minutes' reading. */
export function SignOffSheet({ plan, missionId }: Props) {
  const missions = useMissions();
  const [followed, setFollowed] = useState<string | null>(null);
  const results = plan.requirements.filter((one) => one.missionId === missionId);
  const contacts = useMemo(
    () =>
      plan.contacts.flatMap((one): Contact[] =>
        !isHidden(one) && one.missionId === missionId ? [one] : [],
      ),
    [plan.contacts, missionId],
  );
  const short = results.filter((one) => !one.met).length;
  return (
    <div className="grid items-start gap-3.5 xl:grid-cols-[minmax(0,1fr)_24rem]">
      <div className="flex min-w-0 flex-col gap-3.5">
        <Panel
          title="What you asked, what the plan gives"
          aside={short > 0 ? `${results.length - short} met, ${short} short` : 'all met'}
          flush
        >
          <AskedTable results={results} series={missions.series(missionId)} />
        </Panel>
        <Panel title={counted(contacts.length, 'contact')} flush>
          <DayStrip day={plan.day} contacts={contacts} series={missions.series(missionId)} />
          <OwnContacts
            contacts={contacts}
            stationId={plan.stationId}
            day={plan.day}
            onFollow={setFollowed}
          />
        </Panel>
      </div>
      <div className="flex min-w-0 flex-col gap-3.5">
        <ChangesPanel plan={plan} missionId={missionId} />
        <Decision plan={plan} missionId={missionId} shortCount={short} />
        <DaySky plan={plan} contacts={contacts} followedId={followed} />
      </div>
    </div>
  );
}
