import { describe, expect, it } from 'vitest';
import { EngineError } from '#shared/engine/index.ts';
import { type Coded, encode, type GoldenCall, run } from './coding.ts';
import { REPRESENTATIVE_CALLS } from './representative-calls.ts';

/** Every copy of `coded` in which one number is replaced, with the path of that number. */
function* spoiled(coded: Coded, by: Coded, path: string): Generator<[string, Coded]> {
  if (typeof coded === 'number') yield [path, by];
  if (coded === null || typeof coded !== 'object') return;
  for (const [key, inner] of Object.entries(coded)) {
    for (const [where, changed] of spoiled(inner, by, `${path}.${key}`)) {
      yield [where, Array.isArray(coded) ? coded.with(Number(key), changed) : { ...coded, [key]: changed }];
    }
  }
}

/** What went wrong: a NaN in the result, or an error of another kind. */
function problem(call: Omit<GoldenCall, 'result'>): string | null {
  try {
    return JSON.stringify(encode(run(call))).includes('NaN') ? 'NaN came out' : null;
  } catch (error) {
    if (error instanceof EngineError && error.field !== '' && !error.message.includes('undefined'))
      return null;
    return String(error);
  }
}

describe('a number that is none never comes out as one', () => {
  it.each(REPRESENTATIVE_CALLS.map((call, place) => [place, call.function, call] as const))(
    'call %d, %s',
    (_, __, call) => {
      const problems: string[] = [];
      for (const by of ['NaN', 'Infinity', '-Infinity']) {
        for (const [path, changed] of spoiled(call.arguments, { $number: by }, 'arguments')) {
          const found = problem({ ...call, arguments: changed as Coded[] });
          if (found !== null) problems.push(`${path} = ${by}: ${found}`);
        }
      }
      expect(problems).toEqual([]);
    },
  );
});
