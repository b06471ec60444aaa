import { randomUUID } from 'node:crypto';
import { z } from '@/shared/zod';

interface Shape {
  type?: string;
  const?: unknown;
  enum?: unknown[];
  anyOf?: Shape[];
  oneOf?: Shape[];
  allOf?: Shape[];
  properties?: Record<string, Shape>;
  items?: Shape;
  format?: string;
  default?: unknown;
  minLength?: number;
  minItems?: number;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  exclusiveMaximum?: number;
}

/** Values by the name of a field, for what its type alone does not tell. */
export type Named = Record<string, unknown>;

/** Things that any contract may ask for by these names. */
const everyday: Named = {
  name: 'A good name', email: 'somebody@example.org', password: 'a long enough password', timeZone: 'America/New_York', placeName: 'Yonkers', on: '2026-06-13', seededOn: '2026-06-04', sunHoursOn: '2026-06-04',
  sourceOn: '2026-05-01', seasonFrom: '05-01', seasonTo: '09-30', source: 'a sign at the town hall',
};

function numberIn(shape: Shape): number {
  const low = shape.minimum ?? (shape.exclusiveMinimum === undefined ? 0 : shape.exclusiveMinimum);
  const high = Math.min(shape.maximum ?? shape.exclusiveMaximum ?? low + 10, low + 10);
  const middle = (low + high) / 2;
  return shape.type === 'integer' ? Math.floor(middle) : middle;
}

function sample(shape: Shape, field: string, named: Named): unknown {
  if (field in named) {
    return named[field];
  }
  const choice = (shape.anyOf ?? shape.oneOf)?.find((each) => each.type !== 'null');
  if (choice) {
    return sample(choice, '', named);
  }
  if (shape.allOf) {
    return Object.assign({}, ...shape.allOf.map((part) => sample(part, '', named)));
  }
  if (shape.const !== undefined) {
    return shape.const;
  }
  if (shape.enum) {
    return shape.enum[0];
  }
  switch (shape.type) {
    case 'object':
      return Object.fromEntries(Object.entries(shape.properties ?? {}).map(([name, part]) => [name, sample(part, name, named)]));
    case 'array':
      return Array.from({ length: Math.max(1, shape.minItems ?? 1) }, () => sample(shape.items ?? {}, '', named));
    case 'integer':
    case 'number':
      return numberIn(shape);
    case 'boolean':
      return true;
    case 'string':
      return shape.format === 'uuid' ? randomUUID() : 'some words'.padEnd(shape.minLength ?? 0, '.');
    default:
      return 'some words';
  }
}

/** A body that a contract takes, made from the contract itself; `named` gives the fields that must mean something. It may still fail a refinement. */
export function sampleBody(schema: z.ZodType, named: Named): unknown {
  return sample(z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Shape, '', { ...everyday, ...named });
}
