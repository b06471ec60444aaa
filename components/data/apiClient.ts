import type { ErrorResponse } from '@/shared/contracts/common';
import type { ErrorCode } from '@/shared/errorCodes';
import { ApiError } from './apiError';
import { accessToken, renewSession, sessionEnded } from './session';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

interface RequestOptions {
  body?: unknown;
  /** A write that is sent again with the same key is done once. Made anew for each thing a person does. */
  idempotencyKey?: string;
  /** Without an account: no token is sent and none is renewed. */
  anonymous?: boolean;
  signal?: AbortSignal;
}

/** A new key for one thing a person does. */
export function newKey(): string {
  return crypto.randomUUID();
}

async function sendOnce(method: Method, path: string, options: RequestOptions): Promise<Response> {
  const headers: Record<string, string> = { Accept: 'application/json', 'X-Requested-With': 'dapple' };
  const token = options.anonymous ? null : accessToken();
  if (token !== null) {
    headers['Authorization'] = `Bearer ${token}`;
  }
  if (options.body !== undefined) {
    headers['Content-Type'] = 'application/json';
  }
  if (options.idempotencyKey !== undefined) {
    headers['Idempotency-Key'] = options.idempotencyKey;
  }
  try {
    return await fetch(`/api${path}`, {
      method, headers, credentials: 'same-origin',
      ...(options.body === undefined ? {} : { body: JSON.stringify(options.body) }),
      ...(options.signal === undefined ? {} : { signal: options.signal }),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') {
      throw error;
    }
    throw new ApiError('network', 'No connection just now. What you typed is still here; try again.');
  }
}

async function readError(response: Response): Promise<ApiError> {
  try {
    const { error } = (await response.json()) as ErrorResponse;
    return new ApiError(error.code as ErrorCode, error.message, error.fields ?? [], error.requestId);
  } catch {
    return new ApiError('internal_error', 'The service gave no proper answer. Nothing was saved; try again in a minute.');
  }
}

/**
 * Sends one request to the API. An access token that has run out is renewed once and the request sent again.
 * @returns the body of the answer, shaped as the route's contract says
 * @throws ApiError with the code, sentence and fields of the refusal, or code `network` when no answer came
 */
export async function send<T>(method: Method, path: string, options: RequestOptions = {}): Promise<T> {
  let response = await sendOnce(method, path, options);
  if (response.status === 401 && !options.anonymous) {
    const error = await readError(response);
    if (error.code !== 'sign_in_required') {
      throw error;
    }
    const renewal = await renewSession();
    if (renewal === 'unreachable') {
      throw new ApiError('network', 'No connection just now. What you typed is still here; try again.');
    }
    if (renewal === 'ended') {
      sessionEnded();
      throw error;
    }
    response = await sendOnce(method, path, options);
  }
  if (!response.ok) {
    throw await readError(response);
  }
  return (await response.json()) as T;
}
