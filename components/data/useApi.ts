import { useMutation, useQuery, useQueryClient, type QueryKey, type UseMutationResult, type UseQueryResult } from '@tanstack/react-query';
import { useRef } from 'react';
import { newKey, send, type Method } from './apiClient';
import { ApiError } from './apiError';

interface ReadOptions {
  enabled?: boolean;
  /** Ask again by itself while the screen is up [ms]. */
  everyMs?: number;
  anonymous?: boolean;
}

/** One read of the API as a query. The key starts with the topic, then the ids. */
export function useRead<T>(key: QueryKey, path: string, options: ReadOptions = {}): UseQueryResult<T, ApiError> {
  return useQuery<T, ApiError>({
    queryKey: key,
    queryFn: ({ signal }) => send<T>('GET', path, { signal, ...(options.anonymous ? { anonymous: true } : {}) }),
    enabled: options.enabled ?? true,
    ...(options.everyMs === undefined ? {} : { refetchInterval: options.everyMs }),
  });
}

interface WriteRequest {
  method: Exclude<Method, 'GET'>;
  path: string;
  body?: unknown;
}

interface WriteOptions<T> {
  /** Keys (or beginnings of keys) that the write makes stale. */
  stale?: QueryKey[];
  onDone?: (answer: T) => void;
}

/**
 * One write of the API as a mutation. The idempotency key stays the same while the same request is tried again after a
 * lost connection, so a second tap never does a thing twice.
 */
export function useWrite<T, V>(request: (values: V) => WriteRequest, options: WriteOptions<T> = {}): UseMutationResult<T, ApiError, V> {
  const client = useQueryClient();
  const last = useRef<{ text: string; key: string } | null>(null);
  return useMutation<T, ApiError, V>({
    mutationFn: async (values) => {
      const { method, path, body } = request(values);
      const text = JSON.stringify([method, path, body]);
      if (last.current?.text !== text) {
        last.current = { text, key: newKey() };
      }
      const answer = await send<T>(method, path, { body, idempotencyKey: last.current.key });
      last.current = null;
      return answer;
    },
    onError: (error) => {
      // Only a request whose outcome is unknown may come again under the same key.
      if (!(error instanceof ApiError) || (error.code !== 'network' && error.code !== 'internal_error')) {
        last.current = null;
      }
    },
    onSuccess: async (answer) => {
      await Promise.all((options.stale ?? []).map((queryKey) => client.invalidateQueries({ queryKey })));
      options.onDone?.(answer);
    },
  });
}
