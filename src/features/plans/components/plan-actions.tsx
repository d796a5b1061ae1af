import { Button, ButtonLink, buttonLook } from '../../../components/button.tsx';
import { Icon } from '../../../components/icon.tsx';
import { Menu, MenuDownload, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanEdits } from '../hooks/plan-edits.ts';

/** One primary action, by what the plan allows this person; the rest in a menu. */
export function PlanActions() {
  return (
    <div className="flex items-center gap-2">
      <UndoRedo />
      <MoreMenu />
      <PrimaryAction />
    </div>
  );
}

function PrimaryAction() {
  const { plan, allows } = usePlanDesk();
  const { open } = usePlanEdits();
  if (allows('sign') && plan.signableMissionIds.length > 0)
    return (
      <ButtonLink variant="primary" icon="approve" to={`/plans/${plan.id}/sign-off`}>
        Read and sign
      </ButtonLink>
    );
  if (allows('assign') && plan.contacts.length === 0)
    return (
      <Button variant="primary" onClick={() => open({ kind: 'assignment' })}>
        Assign the open passes
      </Button>
    );
  if (allows('submit'))
    return (
      <Button variant="primary" onClick={() => open({ kind: 'submit' })}>
        Submit for sign-off
      </Button>
    );
  if (allows('release'))
    return (
      <Button
        variant={plan.state === 'approved' ? 'primary' : 'outline'}
        icon="release"
        onClick={() => open({ kind: 'release' })}
      >
        Release plan
      </Button>
    );
  if (allows('revise'))
    return (
      <Button icon="pencil" onClick={() => open({ kind: 'revise' })}>
        Begin a revision
      </Button>
    );
  return null;
}

function UndoRedo() {
  const { allows } = usePlanDesk();
  const { undo, redo, canUndo, canRedo } = usePlanEdits();
  if (!allows('edit')) return null;
  return (
    <div role="group" aria-label="Edits" className="flex">
      <Button
        size="normal"
        icon="undo"
        className="rounded-r-none! px-2.5!"
        disabled={!canUndo}
        aria-label="Take back the last edit"
        title="Take back the last edit (Ctrl Z)"
        onClick={undo}
      />
      <Button
        icon="redo"
        className="-ml-px rounded-l-none! px-2.5!"
        disabled={!canRedo}
        aria-label="Do it again"
        title="Do it again (Ctrl Shift Z)"
        onClick={redo}
      />
    </div>
  );
}

function MoreMenu() {
  const { plan, allows } = usePlanDesk();
  const { open } = usePlanEdits();
  return (
    <Menu
      buttonClassName={buttonLook('outline', 'normal', 'px-2.5!')}
      buttonProps={{ 'aria-label': 'More to do with this plan' }}
      face={<Icon name="more" />}
    >
      {allows('assign') && (
        <MenuItem icon="calendar" onSelect={() => open({ kind: 'assignment' })}>
          Assign the open passes
        </MenuItem>
      )}
      {allows('set-limit') && (
        <MenuItem icon="outside" onSelect={() => open({ kind: 'limit' })}>
          Limit of the day
        </MenuItem>
      )}
      {allows('withdraw') && (
        <MenuItem icon="returned" onSelect={() => open({ kind: 'withdraw' })}>
          Withdraw to draft
        </MenuItem>
      )}
      {allows('release') && plan.state !== 'approved' && (
        <MenuItem icon="release" onSelect={() => open({ kind: 'release' })}>
          Release without all signatures
        </MenuItem>
      )}
      <MenuItem icon="info" onSelect={() => open({ kind: 'keys' })}>
        Keys of this page
      </MenuItem>
      <MenuItem icon="print" onSelect={() => window.print()}>
        Print
      </MenuItem>
      {plan.state === 'released' && (
        <>
          <MenuRule />
          <MenuDownload href={`/api/plans/${plan.id}/contacts.csv`}>Contacts as CSV</MenuDownload>
          <MenuDownload href={`/api/plans/${plan.id}/pointing.csv`}>Pointing as CSV</MenuDownload>
          <MenuDownload href={`/api/plans/${plan.id}/calendar.ics`}>Calendar (ICS)</MenuDownload>
        </>
      )}
    </Menu>
  );
}
