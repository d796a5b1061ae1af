import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';

const KEYS: readonly (readonly [keys: string, words: string])[] = [
  ['Arrows', 'On a contact: walk to the next one; on an end of the stretch: move it by 5 min'],
  ['Enter', 'On a contact: open it in the inspector'],
  ['M', 'On a contact: move it to another channel'],
  ['T', 'On a contact: trim it'],
  ['L', 'On a contact: lock or unlock it'],
  ['Delete', 'On a contact: take it off the plan'],
  ['Ctrl Z, Ctrl Shift Z', 'Take the last edit back, do it again'],
  ['Arrows on the instant', 'Step by a second, with Shift by a minute'],
];

/** Letters act only while a contact has the focus. */
export function KeysDialog({ onClose }: { onClose: () => void }) {
  return (
    <Dialog
      open
      onClose={onClose}
      title="Keys of this page"
      footer={<Button onClick={onClose}>Close</Button>}
    >
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1.5">
        {KEYS.map(([keys, words]) => (
          <div key={keys} className="contents">
            <dt className="font-semibold whitespace-nowrap">{keys}</dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
    </Dialog>
  );
}
