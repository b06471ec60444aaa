import { errorCodes, type ErrorCode } from '@/shared/errorCodes';
import type { FieldError } from '@/shared/contracts/common';

/** An error whose code, sentence and fields the caller may see. Anything else becomes a bland internal error. */
export class AppError extends Error {
  readonly status: number;

  constructor(readonly code: ErrorCode, message: string, readonly fields: FieldError[] = []) {
    super(message);
    this.name = 'AppError';
    this.status = errorCodes[code];
  }
}

export const notFound = (what: string) => new AppError('not_found', `That ${what} is not here, or not yours to see.`);
export const forbidden = () => new AppError('forbidden', 'Your part in this yard does not allow that.');
export const signInRequired = () => new AppError('sign_in_required', 'Sign in first.');

/** A request that is well formed but wrong in one field. */
export function invalidField(path: string, message: string, code = 'custom'): AppError {
  return new AppError('invalid_input', message, [{ path, message, code }]);
}
