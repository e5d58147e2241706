import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api.ts';

/** A refusal will be refused again; only a broken connection or a server that restarts is worth another try. */
function isWorthRetrying(error: unknown): boolean {
  return error instanceof ApiError && (error.code === 'network' || error.code === 'unavailable');
}

export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, error) => failures < 2 && isWorthRetrying(error),
        refetchOnWindowFocus: true,
      },
      mutations: { retry: false },
    },
  });
}
