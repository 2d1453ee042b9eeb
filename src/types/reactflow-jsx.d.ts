import type { JSX as ReactJSX } from 'react';

// reactflow 11 types its components with the global JSX namespace, which React 19's types no longer declare;
// without this its elements silently become `any`.
declare global {
  namespace JSX {
    type Element = ReactJSX.Element;
    type IntrinsicElements = ReactJSX.IntrinsicElements;
  }
}
