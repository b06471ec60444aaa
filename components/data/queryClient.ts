import { QueryClient } from '@tanstack/react-query';

/** A store for what came from the server. Fails early and leaves trying again to the person; nothing is fetched again behind their back. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: { retry: false, refetchOnWindowFocus: false, staleTime: 30_000, networkMode: 'offlineFirst' },
      mutations: { retry: false, networkMode: 'offlineFirst' },
    },
  });
}
