import {
  createContext,
  use,
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
  type ReactNode,
} from 'react';
import { Button, IconButton } from './button.tsx';
import { Icon } from './icon.tsx';

interface Notice {
  id: number;
  tone: 'ok' | 'danger';
  words: string;
  /** One act that answers the notice, such as taking it back. */
  act?: { word: string; run: () => void } | undefined;
}
type Announce = (words: string, options?: Partial<Pick<Notice, 'tone' | 'act'>>) => void;

const AnnounceContext = createContext<Announce>(() => undefined);

/** Says the result of one's own act, to eye and ear. */
export const useAnnounce = (): Announce => use(AnnounceContext);

const STAY_MS = 7000;

export function AnnouncerProvider({ children }: { children: ReactNode }) {
  const [notices, setNotices] = useState<Notice[]>([]);
  const last = useRef(0);
  const dismiss = useCallback((id: number) => {
    setNotices((before) => before.filter((notice) => notice.id !== id));
  }, []);
  const announce = useCallback<Announce>((words, options = {}) => {
    last.current += 1;
    const notice: Notice = { id: last.current, tone: 'ok', words, ...options };
    setNotices((before) => [...before.slice(-2), notice]);
  }, []);
  const list = useMemo(
    () => notices.map((notice) => <NoticeCard key={notice.id} notice={notice} onGone={dismiss} />),
    [notices, dismiss],
  );
  return (
    <AnnounceContext value={announce}>
      {children}
      <div className="pointer-events-none fixed bottom-4 left-1/2 z-60 flex w-100 max-w-[calc(100vw-2.5rem)] -translate-x-1/2 flex-col gap-2">
        <div role="status" aria-live="polite" className="contents">
          {list}
        </div>
      </div>
    </AnnounceContext>
  );
}

function NoticeCard({ notice, onGone }: { notice: Notice; onGone: (id: number) => void }) {
  const { id, tone, words, act } = notice;
  useEffect(() => {
    // What went wrong does not vanish by itself.
    if (tone === 'danger') return undefined;
    const timer = window.setTimeout(() => onGone(id), STAY_MS);
    return () => window.clearTimeout(timer);
  }, [id, tone, onGone]);
  return (
    <div
      {...(tone === 'danger' ? { role: 'alert' } : {})}
      className="pointer-events-auto flex items-center gap-2.5 rounded-panel border border-line bg-surface py-2 pr-2 pl-3 text-table shadow-float"
    >
      <Icon
        name={tone === 'ok' ? 'approve' : 'needsAttention'}
        className={tone === 'ok' ? 'text-ok-mark' : 'text-danger-mark'}
      />
      <span className="min-w-0 flex-1">{words}</span>
      {act && (
        <Button
          size="small"
          variant="quiet"
          onClick={() => {
            act.run();
            onGone(id);
          }}
        >
          {act.word}
        </Button>
      )}
      <IconButton icon="close" label="Close the message" onClick={() => onGone(id)} />
    </div>
  );
}
