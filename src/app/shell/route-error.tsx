import { useRouteError } from 'react-router-dom';
import { Button } from '../../components/button.tsx';
import { ErrorState } from '../../components/states.tsx';

/** The last net: a page that could not be drawn or fetched. */
export function RouteError() {
  const error = useRouteError();
  return (
    <main id="main" className="flex-1 bg-surface">
      <ErrorState error={error} what="This page" />
      <div className="text-center">
        <Button onClick={() => window.location.reload()}>Reload the page</Button>
      </div>
    </main>
  );
}
