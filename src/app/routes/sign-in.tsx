import { useQuery } from '@tanstack/react-query';
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { WordMark } from '../../components/mark.tsx';
import { SignInDrawing } from '../../features/sessions/components/sign-in-drawing.tsx';
import { SignInFoot } from '../../features/sessions/components/sign-in-foot.tsx';
import { SignInForm } from '../../features/sessions/components/sign-in-form.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { sessionQueries } from '../../queries/session-queries.ts';

/** Only addresses of this product are followed after sign-in. */
const safe = (from: string | null): string =>
  from !== null && /^\/(?![/\\])/.test(from) ? from : '/';

export function Component() {
  useTitle('Sign in');
  const session = useQuery(sessionQueries.current());
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const target = safe(search.get('from'));
  if (session.data?.user) return <Navigate to={target} replace />;
  return (
    <div className="grid flex-1 bg-surface narrow:grid-cols-[minmax(22rem,32.5rem)_1fr]">
      <main id="main" className="flex min-h-dvh flex-col px-6 py-11 narrow:px-18">
        <WordMark size={34} />
        <p className="mt-3 mb-12 text-section text-ink-muted">
          The day plan of one array
          <br />
          and the beams it casts.
        </p>
        <h1 className="mb-4 text-page font-semibold">Sign in</h1>
        <SignInForm
          demo={session.data?.demo ?? null}
          onDone={() => void navigate(target, { replace: true })}
        />
        <p className="mt-5 text-table text-ink-muted">
          No account, or locked out? Ask the administrator of your station.
        </p>
        <SignInFoot />
      </main>
      <aside
        aria-label="A drawing of the sky"
        className="hidden min-h-0 border-l border-line bg-raised narrow:block"
      >
        <SignInDrawing />
      </aside>
    </div>
  );
}
