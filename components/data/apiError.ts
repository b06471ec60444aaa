import type { FieldError } from '@/shared/contracts/common';
import type { ErrorCode } from '@/shared/errorCodes';

/** What went wrong with a request; `network` when no answer came at all. */
export class ApiError extends Error {
  constructor(
    readonly code: ErrorCode | 'network',
    message: string,
    readonly fields: FieldError[] = [],
    readonly requestId: string | null = null,
  ) {
    super(message);
    this.name = 'ApiError';
  }
}

/** A sentence a person can act on, for whatever was thrown. */
export function errorMessage(error: unknown): string {
  return error instanceof ApiError ? error.message : 'Something went wrong on this page. Load it again; nothing you saved is lost.';
}

export function hasCode(error: unknown, code: ErrorCode | 'network'): boolean {
  return error instanceof ApiError && error.code === code;
}
