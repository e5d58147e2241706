import { useSyncExternalStore } from 'react';

export interface Toast {
  id: number;
  tone: 'sound' | 'attention' | 'fault' | 'info';
  message: string;
  action?: { label: string; run: () => void };
}

let toasts: readonly Toast[] = [];
let next = 1;
const listeners = new Set<() => void>();

function set(value: readonly Toast[]): void {
  toasts = value;
  for (const listener of listeners) listener();
}

/** Says something in passing, read out politely; one at a time of the same words. */
export function say(message: string, options: Partial<Omit<Toast, 'id' | 'message'>> = {}): number {
  const toast: Toast = { id: next, tone: 'info', message, ...options };
  next += 1;
  set([...toasts.filter((shown) => shown.message !== message), toast].slice(-3));
  return toast.id;
}

export function dismissToast(id: number): void {
  set(toasts.filter((toast) => toast.id !== id));
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useToasts(): readonly Toast[] {
  return useSyncExternalStore(subscribe, () => toasts);
}
