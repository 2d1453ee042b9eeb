import { useEffect, useRef, useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Progress } from '#src/components/ui/progress.tsx';
import { saveText } from '../save-text.ts';

interface SaveAllRowsProps<Row> {
  /** Name of the file. */
  name: string;
  /** How many rows there are. */
  total: number;
  /** Every row this person may see, page after page; it stops when the signal does. */
  pages: (signal: AbortSignal) => AsyncIterable<readonly Row[]>;
  /** Rows as CSV, the first ones under their head. */
  toCsv: (rows: readonly Row[], isFirst: boolean) => string;
}

/** Gathers every row of every group into one CSV file, and says how far it has come. It can be stopped. */
export function SaveAllRows<Row>({ name, total, pages, toCsv }: SaveAllRowsProps<Row>) {
  const [done, setDone] = useState<number | null>(null);
  const [error, setError] = useState<Error | null>(null);
  const stop = useRef<AbortController | null>(null);
  useEffect(() => () => stop.current?.abort(), []);
  const gather = async () => {
    const own = new AbortController();
    stop.current = own;
    setError(null);
    setDone(0);
    try {
      const parts: string[] = [];
      let seen = 0;
      for await (const rows of pages(own.signal)) {
        parts.push(toCsv(rows, parts.length === 0));
        seen += rows.length;
        setDone(seen);
      }
      saveText(name, parts.join(''));
    } catch (problem) {
      if (!own.signal.aborted) setError(problem as Error);
    } finally {
      if (!own.signal.aborted) setDone(null);
    }
  };
  const leave = () => {
    stop.current?.abort();
    setDone(null);
  };
  return (
    <div className="flex flex-col items-start gap-1 pt-1">
      {done === null ? (
        <Button weight="text" onClick={() => void gather()}>
          Save all {total} rows as CSV
        </Button>
      ) : (
        <>
          <Progress label="Gathering rows" done={done} total={total} />
          <Button weight="text" onClick={leave}>
            Stop
          </Button>
        </>
      )}
      {error && <ErrorNotice error={error} onRetry={() => void gather()} />}
    </div>
  );
}
