/**
 * Writes the golden file of the engine's version out of the representative calls. A version that has its file keeps it:
 * whoever changes a result gives the engine another version first.
 * Run: npx tsx tests/golden/write-golden.ts
 */
import { existsSync, writeFileSync } from 'node:fs';
import { ENGINE_VERSION } from '#shared/engine/index.ts';
import { encode, type GoldenCall, run } from './coding.ts';
import { REPRESENTATIVE_CALLS } from './representative-calls.ts';

const file = new URL(`engine-${ENGINE_VERSION}.json`, import.meta.url);
if (existsSync(file)) {
  process.stderr.write(
    `engine-${ENGINE_VERSION}.json is there. A file once written stays; raise ENGINE_VERSION first.\n`,
  );
  process.exitCode = 1;
} else {
  const calls = REPRESENTATIVE_CALLS.map((call): GoldenCall => ({ ...call, result: encode(run(call)) }));
  const lines = calls.map((call) => `    ${JSON.stringify(call)}`).join(',\n');
  writeFileSync(file, `{\n  "engineVersion": "${ENGINE_VERSION}",\n  "calls": [\n${lines}\n  ]\n}\n`);
}
