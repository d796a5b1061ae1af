import { ButtonLink } from '../../components/button.tsx';
import { PageHead } from '../../components/page-head.tsx';
import { EmptyState } from '../../components/states.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { paths } from '../paths.ts';

export function Component() {
  useTitle('No such page');
  return (
    <>
      <PageHead title="No such page" />
      <div className="flex-1 bg-surface">
        <EmptyState
          icon="search"
          title="Nothing stands at this address"
          action={<ButtonLink to={paths.today}>Go to today</ButtonLink>}
        >
          A link may be old, or a letter of it was lost.
        </EmptyState>
      </div>
    </>
  );
}
