import { isRouteErrorResponse, useRevalidator, useRouteError } from 'react-router';
import { LinkButton } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { paths } from './paths.ts';

/** What stands in a screen's place when it cannot be shown: not there, not permitted, or failed. */
export function ErrorPage() {
  const error = useRouteError();
  const revalidator = useRevalidator();
  const status = isRouteErrorResponse(error) || error instanceof ApiProblem ? error.status : 500;
  if (status === 404) return <NotFound detail={error instanceof ApiProblem ? error.detail : undefined} />;
  return (
    <Page title={status === 403 ? 'Not permitted' : 'This screen cannot be shown'}>
      <ErrorNotice error={error} onRetry={() => void revalidator.revalidate()} />
    </Page>
  );
}

/** An address without a screen, or a thing that is not in the register or not this reader's to see. */
export function NotFound({ detail }: { detail?: string }) {
  return (
    <Page title="Not found">
      <p className="max-w-prose">
        {detail ??
          'There is no screen at this address. It may have been mistyped, or the link is older than the register.'}
      </p>
      <div>
        <LinkButton to={paths.desk.href()}>Go to the desk</LinkButton>
      </div>
    </Page>
  );
}
