import { expect, test } from 'vitest';

import { writeResultJsonSchema } from '../../sim/run/result-json-schema.ts';

// `npm run schema` writes the file anew.
test('the JSON Schema of a result beside the cases is the one that the code makes', async () => {
  await expect(writeResultJsonSchema()).toMatchFileSnapshot('../../cases/result.schema.json');
});
