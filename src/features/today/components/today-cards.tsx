import { ButtonLink } from '../../../components/button.tsx';
import { Icon } from '../../../components/icon.tsx';
import type { Tone } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { EmptyState } from '../../../components/states.tsx';
import type { Task } from '../today-tasks.ts';

const MARK: Record<Tone, string> = {
  danger: 'text-danger-mark',
  warn: 'text-warn-mark',
  info: 'text-info-mark',
  ok: 'text-ok-mark',
  neutral: 'text-ink-muted',
};

export function TodayCards({ tasks }: { tasks: readonly Task[] }) {
  return (
    <Panel title="What waits for you" flush>
      {tasks.length === 0 ? (
        <EmptyState icon="approve" title="Nothing waits for you">
          What needs you appears here by itself.
        </EmptyState>
      ) : (
        <ul>
          {tasks.map((task) => (
            <li
              key={task.key}
              className="flex flex-wrap items-center gap-3 border-b border-line-soft px-4 py-3 last:border-b-0"
            >
              <Icon name={task.icon} size={20} className={MARK[task.tone]} />
              <div className="min-w-0 flex-1">
                <p className="text-body font-semibold">{task.title}</p>
                <p className="text-table text-ink-muted">{task.words}</p>
              </div>
              <ButtonLink to={task.to}>
                {task.act} <span className="sr-only">: {task.title}</span>
              </ButtonLink>
            </li>
          ))}
        </ul>
      )}
    </Panel>
  );
}
