import { describe, expect, it } from 'vitest';
import { FailureLimit } from './rate-limit.ts';

function limitOf(maximum: number) {
  let now = Date.parse('2026-03-02T09:00:00Z');
  const limit = new FailureLimit({ now: () => new Date(now) }, maximum, 60_000);
  return { limit, pass: (milliseconds: number) => (now += milliseconds) };
}

describe('the limit of failures', () => {
  it('lets through up to the maximum, then says how long to wait, per key', () => {
    const { limit } = limitOf(2);
    limit.note('a');
    expect(() => limit.check('a')).not.toThrow();
    limit.note('a');
    expect(() => limit.check('a')).toThrow(/Try again in 1 min/);
    expect(() => limit.check('b')).not.toThrow();
  });

  it('forgets each failure when its window has passed', () => {
    const { limit, pass } = limitOf(2);
    limit.note('a');
    pass(40_000);
    limit.note('a');
    pass(19_999);
    expect(() => limit.check('a')).toThrow();
    pass(1);
    expect(() => limit.check('a')).not.toThrow();
  });

  it('takes back the newest failure only', () => {
    const { limit } = limitOf(2);
    limit.note('a');
    limit.note('a');
    limit.takeBack('a');
    expect(() => limit.check('a')).not.toThrow();
    limit.note('a');
    expect(() => limit.check('a')).toThrow();
    limit.clear('a');
    expect(() => limit.check('a')).not.toThrow();
  });
});
