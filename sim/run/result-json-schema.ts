// The result document as JSON Schema, for programs that read it. Made from the schema that makes its type.

import { toJsonSchema } from '@valibot/to-json-schema';

import { RESULT_PARTS, resultSchema } from './result-schema.ts';

const DIALECT = 'https://json-schema.org/draft/2020-12/schema';

/** The JSON Schema (draft 2020-12) of a result document as text, ending in a line break. */
export function writeResultJsonSchema(): string {
  const schema = toJsonSchema(resultSchema, { target: 'draft-2020-12', definitions: RESULT_PARTS });
  return `${JSON.stringify({ $schema: DIALECT, title: 'Bedwave result', ...schema }, null, 2)}\n`;
}
