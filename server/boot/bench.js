import { runTool } from './tool.js';

runTool({ name: 'bench', program: 'tests/bench/run.ts', needsChromium: false });
