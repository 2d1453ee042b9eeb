import { runTool } from './tool.js';

runTool({ name: 'look', program: 'tests/look/run.ts', needsChromium: true });
