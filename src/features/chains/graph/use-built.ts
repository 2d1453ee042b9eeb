import { useContext, useEffect, useState } from 'react';
import { DetailLevelContext } from './detail-level.ts';

/** How many plates and ribbons stand at once, and how many join them in each later frame. */
const FIRST = 120;
const IN_ONE_FRAME = 16;

/**
 * How many of a picture's pieces are built: all of a small one, else more in every frame in which the drawing rests,
 * since all at once would hold up a frame. Once all are, all of any later list are.
 */
export function useBuilt(count: number, isWanted: boolean): number {
  const level = useContext(DetailLevelContext);
  const [built, setBuilt] = useState(isWanted ? FIRST : 0);
  useEffect(() => {
    if (!isWanted || built === Infinity) return;
    const step = () => {
      if (level.isMoving) frame = requestAnimationFrame(step);
      else setBuilt(built >= count ? Infinity : built + IN_ONE_FRAME);
    };
    let frame = requestAnimationFrame(step);
    return () => cancelAnimationFrame(frame);
  }, [level, count, isWanted, built]);
  return Math.min(built, count);
}
