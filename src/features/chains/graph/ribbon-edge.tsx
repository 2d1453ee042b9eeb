import { memo } from 'react';
import type { EdgeProps } from 'reactflow';
import type { Ribbon } from '#shared/drawing/display-list.ts';

export interface RibbonData {
  ribbon: Ribbon;
}

/** Where a link takes the pointer: an unseen line, wide enough to be met. What the eye sees stands in the picture. */
export const RibbonEdge = memo(function RibbonEdge({ data }: EdgeProps<RibbonData>) {
  if (!data) return null;
  const { path, width } = data.ribbon;
  return <path d={path} fill="none" stroke="transparent" strokeWidth={Math.max(14, width)} />;
});
