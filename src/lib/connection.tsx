import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { HealthResponse } from '#shared/contracts/health.ts';
import { get } from './api-client.ts';
import { noteLost, useLostSince } from './connection-state.ts';

const PROBE_MS = 5000;

/** Says that the connection is lost, asks again every few seconds, and goes away by itself when it is back. */
export function ConnectionNotice() {
  const lostSince = useLostSince();
  const queries = useQueryClient();
  useEffect(() => {
    window.addEventListener('offline', noteLost);
    return () => window.removeEventListener('offline', noteLost);
  }, []);
  useEffect(() => {
    if (lostSince === null) return undefined;
    const probe = (): void => {
      get('/api/health', HealthResponse).then(
        () => void queries.invalidateQueries(),
        () => undefined,
      );
    };
    const timer = setInterval(probe, PROBE_MS);
    window.addEventListener('online', probe);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', probe);
    };
  }, [lostSince, queries]);
  return (
    <div role="status">
      {lostSince !== null && (
        <p className="border-b border-caution bg-raised px-4 py-2 text-caution rail:px-7">
          Connection lost at {new Date(lostSince).toTimeString().slice(0, 5)}. What you type is kept in this
          browser; saving works again as soon as the register answers.
        </p>
      )}
    </div>
  );
}
