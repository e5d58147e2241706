import { useEffect, useSyncExternalStore } from 'react';

const KEY = 'tallybarn.shortcuts';
const listeners = new Set<() => void>();

function areOn(): boolean {
  try {
    return localStorage.getItem(KEY) !== 'off';
  } catch (refused) {
    console.info('Storage is closed to this page; shortcuts are on.', refused);
    return true;
  }
}

/** Single keys can get in the way of speech input, so they can be switched off (WCAG 2.1.4). */
export function setShortcuts(on: boolean): void {
  try {
    localStorage.setItem(KEY, on ? 'on' : 'off');
  } catch (refused) {
    console.info('Storage is closed to this page; the choice is not kept.', refused);
  }
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useShortcutsOn(): boolean {
  return useSyncExternalStore(subscribe, areOn);
}

function isTyping(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  return target.isContentEditable || target.matches('input, textarea, select');
}

/** Single keys of the page: nothing while typing, in a dialog, or with a modifier held. */
export function useShortcuts(keys: Readonly<Record<string, () => void>>): void {
  const on = useShortcutsOn();
  useEffect(() => {
    if (!on) return;
    function press(event: KeyboardEvent) {
      if (event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented) return;
      if (isTyping(event.target) || document.querySelector('[data-modal]')) return;
      const run = keys[event.key];
      if (!run) return;
      event.preventDefault();
      run();
    }
    window.addEventListener('keydown', press);
    return () => window.removeEventListener('keydown', press);
  }, [keys, on]);
}
