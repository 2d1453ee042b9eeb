import '@fontsource-variable/instrument-sans/wght.css';
import '@fontsource-variable/newsreader/wght.css';
import '@fontsource-variable/newsreader/wght-italic.css';
import '@fontsource-variable/source-serif-4/wght.css';
import '@fontsource/commit-mono/400.css';
import '#src/styles/index.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router/dom';
import { startTheme } from '#src/lib/preferences.ts';
import { Providers } from './providers.tsx';
import { router } from './router.tsx';

startTheme();

const root = document.getElementById('root');
if (!root) throw new Error('index.html holds no element with the id "root"');

createRoot(root).render(
  <StrictMode>
    <Providers>
      <RouterProvider router={router} />
    </Providers>
  </StrictMode>,
);
