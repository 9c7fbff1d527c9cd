// The case file as a schema: what a person writes. The sections stand in `schema/`; `readCase` checks
// them one by one, so that trouble in one does not hide trouble in another.

import * as v from 'valibot';

import { runSchema, scenarioSchema, uncertainSchema } from './schema/actions.ts';
import { columnSchema } from './schema/column.ts';
import { alarmSchema, controllerSchema, instrumentSchema, interlockSchema, limitSchema } from './schema/control.ts';
import { gasSchema, liquidSchema } from './schema/plant.ts';
import { group, maybe, text } from './schema/primitives.ts';
import { carrierSchema, soluteSchema, solventSchema } from './schema/substances.ts';

/** Version of the case format that this program reads. */
export const FORMAT_VERSION = 1;

export const caseSchema = group({
  $schema: maybe(text('the JSON Schema of case files, for editors', './case.schema.json')),
  shows: text('what the case shows, in a sentence'),
  formatVersion: v.literal(FORMAT_VERSION),
  invented: maybe(v.boolean()),
  title: text('name of the case'),
  solvent: solventSchema,
  carrier: carrierSchema,
  solutes: v.pipe(v.array(soluteSchema), v.minLength(1, 'at least one solute'), v.maxLength(8, 'at most 8 solutes')),
  column: columnSchema,
  gas: gasSchema,
  liquid: liquidSchema,
  instruments: maybe(v.record(v.string(), instrumentSchema)),
  alarms: maybe(v.record(v.string(), alarmSchema)),
  interlocks: maybe(v.record(v.string(), interlockSchema)),
  controllers: maybe(v.record(v.string(), controllerSchema)),
  limits: maybe(v.record(v.string(), limitSchema)),
  scenarios: maybe(v.record(v.string(), scenarioSchema)),
  uncertainty: maybe(v.array(uncertainSchema)),
  run: maybe(runSchema),
});
