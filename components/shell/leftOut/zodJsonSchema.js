// Stands in for zod's JSON Schema parts (12 kB gzip), which only the server uses, for its OpenAPI page. The schemas name one processor per type
// and call none of them until a JSON Schema is asked for.
const onlyOnServer = () => {
  throw new Error('JSON Schema is made on the server: the web bundle leaves zod\'s generator out (metro.config.js).');
};

const names = [
  'string', 'number', 'boolean', 'bigint', 'symbol', 'null', 'undefined', 'void', 'never', 'any', 'unknown', 'date', 'enum', 'literal', 'nan',
  'templateLiteral', 'file', 'success', 'custom', 'function', 'transform', 'map', 'set', 'array', 'object', 'union', 'intersection', 'tuple', 'record',
  'nullable', 'nonoptional', 'default', 'prefault', 'catch', 'pipe', 'readonly', 'promise', 'optional', 'lazy',
];

module.exports = {
  ...Object.fromEntries(names.map((name) => [`${name}Processor`, onlyOnServer])),
  aggregateChecks: onlyOnServer,
  createStandardJSONSchemaMethod: () => onlyOnServer,
  createToJSONSchemaMethod: () => onlyOnServer,
  fromJSONSchema: onlyOnServer,
  JSONSchemaGenerator: onlyOnServer,
  toJSONSchema: onlyOnServer,
};
