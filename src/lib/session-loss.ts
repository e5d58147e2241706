import { useSyncExternalStore } from 'react';

/**
 * A session can end under a page. Requests then wait here while the shell asks the person to sign in again, and are repeated, so
 * that nothing typed is lost. One who declines is not asked again by every request that follows.
 */
type SessionLoss = 'none' | 'asking' | 'declined';

let state: SessionLoss = 'none';
let waiting: Array<(regained: boolean) => void> = [];
/** Only the shell can ask; where it does not stand, a refusal goes straight back. */
const listeners = new Set<() => void>();

function become(next: SessionLoss): void {
  state = next;
  for (const listener of listeners) listener();
}

function settle(regained: boolean): void {
  const settled = waiting;
  waiting = [];
  for (const resolve of settled) resolve(regained);
}

/** True once the person has signed in again; false when they decline or nobody can be asked. */
export function regainSession(signal?: AbortSignal): Promise<boolean> {
  if (listeners.size === 0 || state === 'declined') return Promise.resolve(false);
  return new Promise((resolve) => {
    signal?.addEventListener('abort', () => {
      waiting = waiting.filter((entry) => entry !== resolve);
      resolve(false);
    });
    waiting = [...waiting, resolve];
    become('asking');
  });
}

export function sessionRegained(): void {
  become('none');
  settle(true);
}

export function sessionDeclined(): void {
  become('declined');
  settle(false);
}

export function askForSession(): void {
  become('asking');
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useSessionLoss(): SessionLoss {
  return useSyncExternalStore(subscribe, () => state);
}
