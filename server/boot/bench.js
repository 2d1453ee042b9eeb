import { runCountryBench } from './country-bench.js';
import { runTool } from './tool.js';

const [which, ...sizes] = process.argv.slice(2);
if (which === 'country') runCountryBench(sizes);
else runTool({ name: 'bench', program: 'tests/bench/run.ts', needsChromium: true });
