import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import * as engine from '#shared/engine/index.ts';
import { differences, encode, type GoldenFile, run } from './coding.ts';

const folder = new URL('./', import.meta.url);
const versions = readdirSync(folder)
  .map((name) => /^engine-(\d+\.\d+\.\d+)\.json$/.exec(name)?.[1])
  .filter((version) => version !== undefined);

function read<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(name, folder), 'utf8')) as T;
}

/** Calls of a version that a later one answers otherwise on purpose: their places, the version, the reason. */
type Explained = { call: number; since: string; reason: string }[];

function explained(version: string): Explained {
  const name = `engine-${version}.explained.json`;
  return existsSync(new URL(name, folder)) ? read<Explained>(name) : [];
}

describe.each(versions)('golden file of engine %s', (version) => {
  const golden = read<GoldenFile>(`engine-${version}.json`);
  const changed = explained(version);

  it.each(golden.calls.map((call, place) => [place, call.function, call] as const))(
    'call %d, %s: reproduced, or explained',
    (place, _, call) => {
      if (changed.some((each) => each.call === place)) return;
      expect(differences(call.result, encode(run(call)))).toEqual([]);
    },
  );

  it('explains only what differs, each with a reason', () => {
    expect(golden.engineVersion).toBe(version);
    for (const { call, reason } of changed) {
      expect(reason).not.toBe('');
      expect(differences(golden.calls[call]!.result, encode(run(golden.calls[call]!)))).not.toEqual([]);
    }
  });
});

describe('the version of the engine', () => {
  it('has its golden file, with a call of every public function', () => {
    expect(versions).toContain(engine.ENGINE_VERSION);
    const { calls } = read<GoldenFile>(`engine-${engine.ENGINE_VERSION}.json`);
    const classes = ['Decimal', 'EngineError'];
    const functions = Object.entries(engine)
      .filter(([name, value]) => typeof value === 'function' && !classes.includes(name))
      .map(([name]) => name);
    const called = new Set(calls.map((call) => call.function));
    expect(functions.filter((name) => !called.has(name))).toEqual([]);
  });
});

describe('differences', () => {
  it('sees the thirteenth digit, not the fourteenth, every letter, and what is missing', () => {
    expect(differences(1, 1 + 1e-13)).toEqual([]);
    expect(differences(1, 1 + 2e-12)).toHaveLength(1);
    expect(differences('a', 'b')).toHaveLength(1);
    expect(differences({ $decimal: '1.0001' }, { $decimal: '1.0002' })).toHaveLength(1);
    expect(differences([1], [1, 2])).toHaveLength(1);
    expect(differences({ a: 1, b: { $number: 'Infinity' } }, { a: 1 })).toHaveLength(1);
    expect(differences([1, 1e-16], [1, 2e-16])).toEqual([]);
    expect(differences(null, 0)).toHaveLength(1);
  });
});
