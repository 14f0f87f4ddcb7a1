import { useSyncExternalStore } from 'react';
import type { Point } from '../../geometry/point';

/** Where the pointer is on the sheet, for the few things that follow it; null while it is elsewhere. */
export type PointerPlace = {
  get(): Point | null;
  set(at: Point | null): void;
  subscribe(listener: () => void): () => void;
};

export function createPointerPlace(): PointerPlace {
  let place: Point | null = null;
  const listeners = new Set<() => void>();
  return {
    get: () => place,
    set(at) {
      place = at;
      for (const listener of listeners) listener();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

const never = () => () => {};
const nowhere = () => null;

/** Follows the pointer while `following`; renders nothing while not. */
export function usePointerPlace(place: PointerPlace, following: boolean): Point | null {
  return useSyncExternalStore(following ? place.subscribe : never, following ? place.get : nowhere, nowhere);
}
