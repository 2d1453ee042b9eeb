import { createContext, useContext, useEffect, useState } from 'react';
import { BRIEF_BELOW } from './brief-plate.ts';

type Listener = (isBrief: boolean) => void;

/** How many plates and links change their face in one frame: all at once would hold up a frame. */
const IN_ONE_FRAME = 40;

/**
 * Whether the drawing stands so small that plates show number and state only. It tells its listeners a few at a
 * time, frame by frame.
 */
export class DetailLevel {
  isBrief = false;
  #listeners = new Set<Listener>();
  #waiting: Listener[] = [];
  #frame = 0;

  /** To be called whenever the zoom has changed. */
  follow(zoom: number): void {
    const isBrief = zoom < BRIEF_BELOW;
    if (isBrief === this.isBrief) return;
    this.isBrief = isBrief;
    this.#waiting = [...this.#listeners];
    if (this.#frame === 0) this.#tellSome();
  }

  /** Tells the level now and whenever it changes. @returns ends the listening */
  listen(listener: Listener): () => void {
    this.#listeners.add(listener);
    listener(this.isBrief);
    return () => this.#listeners.delete(listener);
  }

  #tellSome(): void {
    for (const listener of this.#waiting.splice(0, IN_ONE_FRAME)) {
      if (this.#listeners.has(listener)) listener(this.isBrief);
    }
    this.#frame = this.#waiting.length === 0 ? 0 : requestAnimationFrame(() => this.#tellSome());
  }
}

/** The level of the drawing around. */
export const DetailLevelContext = createContext(new DetailLevel());

/** Whether to be drawn brief. */
export function useIsBrief(): boolean {
  const level = useContext(DetailLevelContext);
  const [isBrief, setBrief] = useState(level.isBrief);
  useEffect(() => level.listen(setBrief), [level]);
  return isBrief;
}
