/**
 * A session can end under a page: requests then wait here while the person signs in again, and are repeated, so that nothing
 * typed is lost. The shell shows the dialog and settles the wait.
 */
type Listener = () => void;

let waiting: Array<(regained: boolean) => void> = [];
const listeners = new Set<Listener>();
/** Only a page inside the shell can ask; elsewhere a refusal goes straight back. */
let asker = false;
/** Stays until it is settled: requests that are given up meanwhile do not bring the session back. */
let lost = false;

function announce(): void {
  for (const listener of listeners) listener();
}

/** Resolves true once the person has signed in again, false when they decline, at once where nobody can be asked. */
export function regainSession(signal?: AbortSignal): Promise<boolean> {
  if (!asker) return Promise.resolve(false);
  return new Promise((resolve) => {
    signal?.addEventListener('abort', () => {
      waiting = waiting.filter((entry) => entry !== resolve);
      resolve(false);
    });
    waiting = [...waiting, resolve];
    lost = true;
    announce();
  });
}

export function settleSessionLoss(regained: boolean): void {
  const settled = waiting;
  waiting = [];
  lost = false;
  for (const settle of settled) settle(regained);
  announce();
}

export function isSessionLost(): boolean {
  return lost;
}

export function subscribeToSessionLoss(listener: Listener): () => void {
  listeners.add(listener);
  asker = true;
  return () => {
    listeners.delete(listener);
    asker = listeners.size > 0;
  };
}
