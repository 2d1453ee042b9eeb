import '@fontsource-variable/instrument-sans/wght.css';
import '@fontsource-variable/newsreader/wght.css';
import '@fontsource-variable/newsreader/wght-italic.css';
import '@fontsource-variable/source-serif-4/wght.css';
import '@fontsource/commit-mono/400.css';
import '#src/styles/index.css';
import { config } from 'zod/v4/core';
import { startTheme } from '#src/lib/preferences.ts';

startTheme();

// Under our content security policy zod may compile nothing, and even its asking is reported. It asks when the
// first schema is made, so everything that holds schemas is fetched only after this line.
config({ jitless: true });
void import('./start.tsx');
