// The case schema as JSON Schema, for editors: descriptions, the pattern and an example of each quantity,
// the words to choose from. Made from the same schema that reads the file.

import { toJsonSchema } from '@valibot/to-json-schema';

import { caseSchema } from './schema.ts';
import { actionSchema, conditionSchema, scenarioSchema, stepSchema } from './schema/actions.ts';
import { columnSchema, packingSchema } from './schema/column.ts';
import { alarmSchema, controllerSchema, instrumentSchema, interlockSchema, limitSchema } from './schema/control.ts';
import { gasSchema, liquidSchema } from './schema/plant.ts';
import { NOUN } from './schema/primitives.ts';
import { carrierSchema, equilibrium, soluteSchema, solventSchema } from './schema/substances.ts';

const DIALECT = 'https://json-schema.org/draft/2020-12/schema';

/** Parts that are written once and referred to by name. */
const DEFINITIONS = {
  solvent: solventSchema,
  carrier: carrierSchema,
  solute: soluteSchema,
  equilibrium,
  column: columnSchema,
  packing: packingSchema,
  gas: gasSchema,
  liquid: liquidSchema,
  instrument: instrumentSchema,
  alarm: alarmSchema,
  interlock: interlockSchema,
  controller: controllerSchema,
  limit: limitSchema,
  condition: conditionSchema,
  action: actionSchema,
  step: stepSchema,
  scenario: scenarioSchema,
};

/** The JSON Schema (draft 2020-12) of a case file as text, ending in a line break. */
export function writeJsonSchema(): string {
  const schema = toJsonSchema(caseSchema, {
    target: 'draft-2020-12',
    typeMode: 'input',
    errorMode: 'ignore',
    definitions: DEFINITIONS,
  });
  const titled = { $schema: DIALECT, title: 'Bedwave case', ...schema };
  return `${JSON.stringify(titled, (key, value: unknown) => (key === NOUN ? undefined : value), 2)}\n`;
}
