// Stands in for zod's ahead-of-time compiler (8 kB gzip): the content security policy forbids compiled parsers, so none is ever made.
export const INVALID = Symbol.for('zod.compile.invalid');
export class ZodCompileAsyncError extends Error {}
export class ZodCompileUnsupportedError extends Error {}
export const compile = (schema) => schema;
export const withParser = (schema) => schema;
