import { useId, useRef, useState, type DragEvent } from 'react';
import { Icon } from '../../../components/icon.tsx';
import { classNames } from '../../../lib/class-names.ts';

interface Props {
  onFile: (file: File) => void;
  busy: boolean;
}

/** A file by drag and drop, by choosing, or by keyboard. */
export function DropZone({ onFile, busy }: Props) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    const file = event.dataTransfer.files[0];
    if (file) onFile(file);
  };
  return (
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={classNames(
        'flex flex-col items-center rounded-panel border border-dashed px-6 py-12 text-center transition-colors duration-control',
        over ? 'border-accent bg-accent-soft' : 'border-line-strong bg-surface',
      )}
    >
      <Icon name="upload" size={28} className="text-ink-muted" />
      <label htmlFor={id} className="mt-3 text-section font-semibold">
        {busy ? 'Reading the file' : 'Drop a file of element sets here'}
      </label>
      <p className="mt-1 text-body text-ink-muted">
        Two-line or three-line format, plain text, up to 2 MB. Nothing changes before you accept.
      </p>
      <input
        ref={input}
        id={id}
        type="file"
        accept=".tle,.txt,.3le,.2le,text/plain"
        disabled={busy}
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) onFile(file);
          event.target.value = '';
        }}
        className="mt-5 text-body text-ink-muted file:mr-3 file:min-h-8 file:rounded-control file:border file:border-solid file:border-line-strong file:bg-surface file:px-3.5 file:text-body file:font-medium file:text-ink"
      />
    </div>
  );
}
