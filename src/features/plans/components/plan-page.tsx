import { Suspense, lazy, useEffect } from 'react';
import type { Plan } from '../../../../shared/schemas/plan.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { Button } from '../../../components/button.tsx';
import { Skeleton } from '../../../components/states.tsx';
import { isStale } from '../../../lib/api-error.ts';
import { PlanDeskContext, usePlanDesk, type PlanDesk } from '../hooks/plan-desk.ts';
import { PlanEditsContext, usePlanEdits } from '../hooks/plan-edits.ts';
import { PlanViewContext, usePlanView } from '../hooks/plan-view.ts';
import { useDeskData } from '../hooks/use-desk-data.ts';
import { useEditState } from '../hooks/use-edit-state.ts';
import { useViewState } from '../hooks/use-view-state.ts';
import { ContactTable } from './contact-table.tsx';
import { PlanDialogs } from './dialogs/plan-dialogs.tsx';
import { EditFailure } from './edit-failure.tsx';
import { Inspector } from './inspector/inspector.tsx';
import { OpenPassTable } from './open-pass-table.tsx';
import { NotOnPlan } from './not-on-plan.tsx';
import { PlanBar } from './plan-bar.tsx';
import { PlanLoadLine } from './plan-load-line.tsx';
import { PlanNotices } from './plan-notices.tsx';

const PlanCalendar = lazy(async () => ({
  default: (await import('./calendar/plan-calendar.tsx')).PlanCalendar,
}));
const PlanSky = lazy(async () => ({ default: (await import('./sky/plan-sky.tsx')).PlanSky }));
const PlanMap = lazy(async () => ({ default: (await import('./map/plan-map.tsx')).PlanMap }));

export function PlanPage({ plan, station }: { plan: Plan; station: Station | null }) {
  const desk = useDeskData(plan, station);
  if (!desk) return <Skeleton rows={10} />;
  return <Desk desk={desk} />;
}

function Desk({ desk }: { desk: PlanDesk }) {
  const view = useViewState(desk.span, desk.legs);
  const { edits, error, clearError } = useEditState(desk.plan);
  return (
    <PlanDeskContext value={desk}>
      <PlanViewContext value={view}>
        <PlanEditsContext value={edits}>
          <UndoKeys />
          <div className="flex flex-1 flex-col bg-surface drawer:h-[calc(100dvh-3.3125rem)] drawer:flex-none">
            <PlanBar />
            <PlanNotices />
            <Body />
          </div>
          <PlanDialogs />
          <EditFailure
            error={error}
            onClose={() => {
              // What was thought out on an older plan is not offered again.
              if (isStale(error)) edits.close();
              clearError();
            }}
          />
        </PlanEditsContext>
      </PlanViewContext>
    </PlanDeskContext>
  );
}

function Body() {
  const { view } = usePlanView();
  if (view === 'sky' || view === 'map')
    return (
      <Suspense fallback={<Skeleton rows={8} />}>
        {view === 'sky' ? <PlanSky /> : <PlanMap />}
      </Suspense>
    );
  return (
    <>
      <div className="border-b border-line bg-surface py-1">
        <PlanLoadLine mode="stretch" />
      </div>
      {view === 'table' ? <TableBody /> : <CalendarBody />}
    </>
  );
}

function CalendarBody() {
  return (
    <div className="grid min-h-0 flex-1 drawer:grid-cols-[16.125rem_minmax(0,1fr)_21.5rem]">
      <aside
        aria-label="Passes that are not on the plan"
        className="max-h-120 min-h-0 border-line drawer:max-h-none drawer:border-r"
      >
        <NotOnPlan />
      </aside>
      <CalendarOrEmpty />
      <Details />
    </div>
  );
}

/** Contacts and open passes as tables, with the same actions as the calendar. */
function TableBody() {
  return (
    <div className="grid min-h-0 flex-1 drawer:grid-cols-[minmax(0,1fr)_21.5rem]">
      <div
        className="min-w-0 overflow-y-auto bg-surface"
        tabIndex={0}
        role="group"
        aria-label="Tables of the plan"
      >
        <h2 className="px-4 pt-3 pb-1 text-section font-semibold">Contacts</h2>
        <ContactTable />
        <h2 className="px-4 pt-6 pb-1 text-section font-semibold">Not on the plan</h2>
        <OpenPassTable />
      </div>
      <Details />
    </div>
  );
}

const Details = () => (
  <aside aria-label="Details" className="min-h-0 border-line drawer:border-l">
    <Inspector />
  </aside>
);

function CalendarOrEmpty() {
  const { plan, allows, openPasses } = usePlanDesk();
  const { open } = usePlanEdits();
  return (
    <div className="relative flex min-h-120 min-w-0 drawer:min-h-0">
      <Suspense fallback={<Skeleton rows={10} />}>
        <PlanCalendar />
      </Suspense>
      {plan.contacts.length === 0 && (
        <div className="pointer-events-none absolute inset-x-0 top-28 flex justify-center">
          <div className="pointer-events-auto max-w-90 rounded-panel border border-line bg-surface px-6 py-5 text-center shadow-float">
            <p className="text-section font-semibold">No contact on this plan yet</p>
            <p className="mt-1 text-body text-ink-muted">
              {openPasses?.length ?? 0} passes are open. The server assigns them to beam channels
              within the limit of the day, or you assign one by one.
            </p>
            {allows('assign') && (
              <Button
                className="mt-4"
                variant="primary"
                onClick={() => open({ kind: 'assignment' })}
              >
                Assign the open passes
              </Button>
            )}
          </div>
        </div>
      )}
    </div>
  );
}

/** Ctrl Z and Ctrl Shift Z, unless somebody is typing. */
function UndoKeys() {
  const { undo, redo, canUndo, canRedo } = usePlanEdits();
  useEffect(() => {
    const keys = (event: KeyboardEvent): void => {
      const typing =
        event.target instanceof HTMLElement && event.target.matches('input, textarea, select');
      if (typing || !(event.ctrlKey || event.metaKey) || event.key.toLowerCase() !== 'z') return;
      event.preventDefault();
      if (event.shiftKey && canRedo) redo();
      else if (!event.shiftKey && canUndo) undo();
    };
    window.addEventListener('keydown', keys);
    return () => window.removeEventListener('keydown', keys);
  }, [undo, redo, canUndo, canRedo]);
  return null;
}
