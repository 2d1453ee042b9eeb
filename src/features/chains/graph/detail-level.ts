import { createContext, useContext, useSyncExternalStore } from 'react';
import { BRIEF_BELOW } from './brief-plate.ts';

/** How closely the drawing is looked at, and whether it moves: kept past React, which has nothing to do meanwhile. */
export class DetailLevel {
  /** Whether plates show number and state only, since they stand small. */
  isBrief = false;
  /** While it moves nothing is built, so that every frame is in time. */
  isMoving = false;
  #listeners = new Set<() => void>();

  move(): void {
    this.isMoving = true;
  }

  rest(zoom: number): void {
    this.isMoving = false;
    this.follow(zoom);
  }

  /** To be called when the drawing stands at another zoom. */
  follow(zoom: number): void {
    const isBrief = zoom < BRIEF_BELOW;
    if (isBrief === this.isBrief) return;
    this.isBrief = isBrief;
    for (const listener of this.#listeners) listener();
  }

  /** Tells when the level has changed. @returns ends the listening */
  listen = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };
}

/** The level of the drawing around. */
export const DetailLevelContext = createContext(new DetailLevel());

/** Whether to be drawn brief. */
export function useIsBrief(): boolean {
  const level = useContext(DetailLevelContext);
  return useSyncExternalStore(level.listen, () => level.isBrief);
}
