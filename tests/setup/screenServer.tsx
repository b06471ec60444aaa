import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, type RenderResult } from '@testing-library/react';
import type { ReactElement } from 'react';

/** What was sent to the service. */
export interface SentRequest {
  method: string;
  path: string;
  body: unknown;
}

/**
 * A service at the other end of the wire: it answers as told and keeps what it was sent.
 * @param answer - the body for a request, or null for a refusal of the field 'on'
 */
export function answerRequests(answer: (request: SentRequest) => unknown): SentRequest[] {
  const sent: SentRequest[] = [];
  const own = globalThis.fetch;
  globalThis.fetch = ((url: string, init?: RequestInit) => {
    const request: SentRequest = { method: init?.method ?? 'GET', path: url.replace(/^\/api/, ''), body: typeof init?.body === 'string' ? JSON.parse(init.body) as unknown : undefined };
    sent.push(request);
    const body = answer(request);
    const refusal = { error: { code: 'invalid_input', message: 'Look at the day again.', fields: [{ path: 'on', message: 'That day has not come yet.', code: 'custom' }], requestId: 'r' } };
    return Promise.resolve({ ok: body !== null, status: body === null ? 400 : 200, json: () => Promise.resolve(body ?? refusal) } as Response);
  }) as typeof fetch;
  afterAll(() => {
    globalThis.fetch = own;
  });
  return sent;
}

/** Shows a part of a screen with a query client of its own. */
export function renderPart(part: ReactElement): RenderResult {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false }, mutations: { retry: false } } });
  return render(<QueryClientProvider client={client}>{part}</QueryClientProvider>);
}
