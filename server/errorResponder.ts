import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';
import { ForeignKeyConstraintError, UniqueConstraintError } from 'sequelize';
import { AppError } from '@/server/errors';
import { PhysicsError } from '@/scheduling/units/physicsError';
import type { ErrorResponse } from '@/shared/contracts/common';

/** Errors of Express' own body parser carry a type and a status below 500. */
interface ParserError {
  type?: unknown;
  status?: unknown;
}

function toAppError(error: unknown): AppError {
  if (error instanceof AppError) {
    return error;
  }
  if (error instanceof PhysicsError) {
    const message = `That cannot be: ${error.message}.`;
    // Places in lists as the contracts write them: days.0.tminC.
    return new AppError('invalid_input', message, [{ path: error.field.replace(/\[(\d+)\]/g, '.$1'), message, code: 'custom' }]);
  }
  if (error instanceof UniqueConstraintError) {
    return new AppError('conflict', 'That is there already.');
  }
  if (error instanceof ForeignKeyConstraintError) {
    return new AppError('invalid_input', 'That points to something that is not in this yard.');
  }
  const { type, status } = (typeof error === 'object' && error !== null ? error : {}) as ParserError;
  if (type === 'entity.too.large') {
    return new AppError('body_too_large', 'That is more than one request may carry.');
  }
  if (type === 'entity.parse.failed' || type === 'encoding.unsupported' || type === 'charset.unsupported') {
    return new AppError('invalid_json', 'That is not JSON.');
  }
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new AppError('invalid_input', 'That request cannot be read.');
  }
  return new AppError('internal_error', 'Something went wrong here. Nothing was saved. Try again; if it stays, tell us the number of the request.');
}

/** Turns whatever was thrown into the one public shape. Only what nobody expected is logged as an error. */
export function errorResponder(log: Logger): ErrorRequestHandler {
  return (error, request, response, _next) => {
    const known = toAppError(error);
    if (known.status >= 500) {
      log.error({ err: error as Error, requestId: request.id }, 'request failed');
    }
    if (response.headersSent) {
      response.end();
      return;
    }
    const body: ErrorResponse = {
      error: { code: known.code, message: known.message, requestId: String(request.id), ...(known.fields.length > 0 ? { fields: known.fields } : {}) },
    };
    response.status(known.status).json(body);
  };
}
