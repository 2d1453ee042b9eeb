import { ApiProblem, problemLine } from '#src/lib/api-problem.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

interface ErrorNoticeProps {
  /** Whatever was caught. */
  error: unknown;
  /** Does the same thing again; without it no such offer is made. */
  onRetry?: () => void;
  /** Leaves the field problems to the fields themselves. */
  hidesFields?: boolean;
}

/** Says what failed, why and what to do next, from the server's problem document where there is one. */
export function ErrorNotice({ error, onRetry, hidesFields = false }: ErrorNoticeProps) {
  const problem = error instanceof ApiProblem ? error : null;
  const fields = hidesFields ? [] : Object.entries(problem?.fields ?? {});
  return (
    <Notice
      role="alert"
      tone="broken"
      title={problem?.title ?? 'This part of the screen failed'}
      answers={
        onRetry && (
          <Button weight="text" onClick={onRetry}>
            Try again
          </Button>
        )
      }
    >
      <p>
        {problem?.detail ?? 'Reload the page. What was saved is safe, and drafts are kept in this browser.'}
      </p>
      {fields.length > 0 && (
        <ul className="mt-1">
          {fields.map(([path, field]) => (
            <li key={path}>
              <span className="font-mono text-sm">{path}</span>: {problemLine(field)}
            </li>
          ))}
        </ul>
      )}
      {problem?.instance && (
        <p className="mt-1 text-sm text-ink-3">
          Request <span className="font-mono">{problem.instance}</span>
        </p>
      )}
    </Notice>
  );
}
