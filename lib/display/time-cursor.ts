/**
 * The one cursor that joins map, charts and tables of a session: a moment (UTC epoch milliseconds) or null
 * when nothing is pointed at. Drawings subscribe and move their mark by hand, so that a moving cursor
 * costs no render of the page.
 */
export type TimeCursor = {
  get(): number | null;
  /** Calls the listener after every change; returns the function that ends the subscription. */
  subscribe(listener: (timeMs: number | null) => void): () => void;
  set(timeMs: number | null): void;
};

/**
 * A new cursor that points at nothing, or at `initialMs`. Setting the value it already has calls nobody;
 * NaN and infinities count as null. A listener that ends its subscription while it is being called is safe.
 *
 * @example
 * createTimeCursor(1000).get(); // 1000
 */
export function createTimeCursor(initialMs: number | null = null): TimeCursor {
  let current = cleaned(initialMs);
  const listeners = new Set<(timeMs: number | null) => void>();
  return {
    get: () => current,
    subscribe(listener) {
      // A wrapper per subscription: the same function may subscribe twice and end each on its own.
      const own = (timeMs: number | null) => listener(timeMs);
      listeners.add(own);
      return () => {
        listeners.delete(own);
      };
    },
    set(timeMs) {
      const next = cleaned(timeMs);
      if (next === current) return;
      current = next;
      for (const listener of [...listeners]) listener(next);
    },
  };
}

function cleaned(timeMs: number | null): number | null {
  return timeMs !== null && Number.isFinite(timeMs) ? timeMs : null;
}
