import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate, Method, MethodResult } from '#shared/contracts/estimates.ts';

export type Computed = Exclude<MethodResult, { unavailable: true }>;

export interface ComputedMethod {
  method: Method;
  result: Computed;
}

export function computedMethods({ methods }: Estimate): ComputedMethod[] {
  return METHODS.flatMap((method) => {
    const result = methods[method];
    return !result || 'unavailable' in result ? [] : [{ method, result }];
  });
}

export function computedOf({ methods }: Estimate, method: Method): Computed | null {
  const result = methods[method];
  return !result || 'unavailable' in result ? null : result;
}

export function refusedMethods({ methods }: Estimate): { method: Method; reason: string }[] {
  return METHODS.flatMap((method) => {
    const result = methods[method];
    return result && 'unavailable' in result ? [{ method, reason: result.reason }] : [];
  });
}

/** What the others are held against: the exact calculation; where there is none, first order; else whatever there is. */
export function referenceOf(estimate: Estimate): ComputedMethod | null {
  const computed = computedMethods(estimate);
  return (
    computed.find(({ method }) => method === 'partialWaves') ??
    computed.find(({ method }) => method === 'born1') ??
    computed[0] ??
    null
  );
}

/** The reference in a word, as it stands after "against". */
export function referenceName(method: Method): string {
  const names: Record<Method, string> = {
    partialWaves: 'exact',
    born1: 'first order',
    born2: 'second order',
    eikonal: 'eikonal',
  };
  return names[method];
}
