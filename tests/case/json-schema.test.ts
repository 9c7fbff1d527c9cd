import { expect, test } from 'vitest';

import { writeJsonSchema } from '../../sim/case/json-schema.ts';

// `npm run schema` writes the file anew.
test('the JSON Schema beside the cases is the one that the code makes', async () => {
  await expect(writeJsonSchema()).toMatchFileSnapshot('../../cases/case.schema.json');
});
