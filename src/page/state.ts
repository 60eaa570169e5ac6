// What the reader has chosen, and who wants to know when it changes.
import type { MapState } from '../view/contract.ts';

export interface PageState extends MapState {
  /** The count that the charts are read at; null until the reader points at one. */
  readonly marked: number | null;
}

export interface Store {
  get(): PageState;
  set(change: Partial<PageState>): void;
  onChange(listener: (state: PageState) => void): void;
}

export function createStore(initial: PageState): Store {
  let state = initial;
  const listeners: ((state: PageState) => void)[] = [];
  return {
    get: () => state,
    set(change) {
      state = { ...state, ...change };
      for (const listener of listeners) listener(state);
    },
    onChange: (listener) => void listeners.push(listener),
  };
}
