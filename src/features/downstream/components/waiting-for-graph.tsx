import { Progress, Waiting } from '#src/components/ui/progress.tsx';
import { readingProgress } from '#src/lib/register-being-read.ts';

interface WaitingForGraphProps {
  /** Why the query's latest attempt failed; it is tried again by itself. */
  because: Error | null;
  /** What is being worked out, as a phrase. */
  children: string;
}

/** Waits for an answer, and after a start of the server shows how far it has come in reading its register. */
export function WaitingForGraph({ because, children }: WaitingForGraphProps) {
  const progress = readingProgress(because);
  if (!progress || progress.total === 0) return <Waiting>{children}</Waiting>;
  return <Progress label="The register is being read: values and links" {...progress} />;
}
