/**
 * Prints how long the exact variances of a generated register take, with and without shared sources, and how they
 * compare with Debian's python3-uncertainties on a smaller register of the same kind, where that is installed: largest
 * difference, and how many times faster per value. Processor time is the one to read on a shared machine.
 * Run: npx tsx tests/bench/network-variances.ts [number of values]
 */
import { spawnSync } from 'node:child_process';
import { networkFromArrays, type NetworkArrays } from '#shared/engine/network/network-from-arrays.ts';
import { seededRandom } from '#shared/engine/network/test-support/random.ts';
import { variances } from '#shared/engine/network/variances.ts';

const LEVELS = 14;

/** A register that widens downwards: level by level, each value leaning on one to three values above it. */
function generatedRegister(valueCount: number, withSources: boolean): NetworkArrays {
  const random = seededRandom(valueCount);
  const levelStart = Array.from({ length: LEVELS + 1 }, (_, level) =>
    Math.floor(valueCount * (level / LEVELS) ** 4),
  );
  levelStart[1] = Math.max(3, levelStart[1]!);
  // A reference's volume: it enters the reference's own calibration with +, each use of it with -.
  const sourceCount = withSources ? levelStart[LEVELS - 1]! : 0;
  const child: number[] = [];
  const parent: number[] = [];
  const sensitivity: number[] = [];
  for (let level = 1; level < LEVELS; level += 1) {
    const above = levelStart[level - 1]!;
    const width = levelStart[level]! - above;
    for (let node = levelStart[level]!; node < levelStart[level + 1]!; node += 1) {
      const first = Math.floor(random() * width);
      const parents = random() < 0.8 ? 1 : random() < 0.6 ? 2 : 3;
      // The references of one calibration come from one laboratory: they stand close together.
      for (let n = 0; n < parents; n += 1) {
        const reference = above + ((first + n) % width);
        child.push(node);
        parent.push(reference);
        sensitivity.push(0.4 + 0.4 * random());
        if (withSources) {
          child.push(node);
          parent.push(valueCount + reference);
          sensitivity.push(-0.1 * random());
        }
      }
      if (node < sourceCount) {
        child.push(node);
        parent.push(valueCount + node);
        sensitivity.push(0.1 * random());
      }
    }
  }
  return {
    local: Float64Array.from({ length: valueCount }, () => 0.5 + random()),
    child: Int32Array.from(child),
    parent: Int32Array.from(parent),
    sensitivity: Float64Array.from(sensitivity),
    sourceUncertainty: Float64Array.from({ length: sourceCount }, () => random()),
  };
}

/** Wall clock, and processor time, which says more where other programs share the processor. */
function timed<T>(work: () => T): { seconds: number; processor: number; result: T } {
  const start = performance.now();
  const before = process.cpuUsage();
  const result = work();
  const used = process.cpuUsage(before);
  const seconds = (performance.now() - start) / 1000;
  return { seconds, processor: (used.user + used.system) / 1e6, result };
}

function measure(valueCount: number, withSources: boolean): void {
  const arrays = generatedRegister(valueCount, withSources);
  const compile = timed(() => networkFromArrays(arrays));
  const solve = timed(() => variances(compile.result));
  const memory = process.memoryUsage();
  const inputs = withSources ? 'with shared sources' : 'values only';
  console.log(
    `${valueCount} values, ${arrays.child.length} links, ${inputs}: ` +
      `compile ${compile.seconds.toFixed(2)} s, variances ${solve.seconds.toFixed(2)} s (processor ${solve.processor.toFixed(2)} s), ` +
      `typed arrays ${(memory.arrayBuffers / 1e6).toFixed(0)} MB, process ${(memory.rss / 1e6).toFixed(0)} MB`,
  );
}

const PYTHON = `
import json, sys, time
from uncertainties import ufloat
graph = json.load(sys.stdin)
start = time.time()
used = time.process_time()
nodes = [ufloat(0, u) for u in graph['local']]
sources = [ufloat(0, u) for u in graph['source']]
every = nodes + sources
links = {}
for child, parent, c in zip(graph['child'], graph['parent'], graph['sensitivity']):
    links.setdefault(child, []).append((parent, c))
for child in sorted(links):
    for parent, c in links[child]:
        every[child] = every[child] + c * every[parent]
out = [every[i].std_dev ** 2 for i in range(len(nodes))]
json.dump({'seconds': time.time() - start, 'processor': time.process_time() - used, 'variances': out}, sys.stdout)
`;

function compareWithPython(valueCount: number): void {
  const arrays = generatedRegister(valueCount, true);
  // Once unmeasured on another register of the kind: the first run of any program is the compiler's.
  variances(networkFromArrays(generatedRegister(valueCount + 1, true)));
  const own = timed(() => variances(networkFromArrays(arrays)));
  const input = JSON.stringify({
    local: Array.from(arrays.local),
    source: Array.from(arrays.sourceUncertainty ?? []),
    child: Array.from(arrays.child),
    parent: Array.from(arrays.parent),
    sensitivity: Array.from(arrays.sensitivity),
  });
  // Debian's modules belong to Debian's interpreter, which another one on the path may hide.
  const python = spawnSync('/usr/bin/python3', ['-c', PYTHON], {
    input,
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  if (python.status !== 0) {
    console.log('python3-uncertainties is not installed: no comparison with it.');
    return;
  }
  const other = JSON.parse(python.stdout) as { seconds: number; processor: number; variances: number[] };
  const worst = other.variances.reduce((most, v, i) => Math.max(most, Math.abs(own.result[i]! / v - 1)), 0);
  console.log(
    `${valueCount} values against python3-uncertainties: largest relative difference ${worst.toExponential(1)}; ` +
      `compile and variances ${own.processor.toFixed(3)} s of processor time here, ${other.processor.toFixed(2)} s there: ` +
      `${(other.processor / own.processor).toFixed(0)} times faster per value (wall clock ${own.seconds.toFixed(3)} s and ${other.seconds.toFixed(2)} s)`,
  );
}

const valueCount = Number(process.argv[2] ?? 1_000_000);
measure(valueCount, false);
measure(valueCount, true);
compareWithPython(20_000);
