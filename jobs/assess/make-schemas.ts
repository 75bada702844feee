/** Writes the published JSON Schemas. Run `npx tsx jobs/assess/make-schemas.ts` after the Zod types changed. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { PUBLISHED_SCHEMAS } from '../../src/lib/schemas/assessment-published';

const folder = join(dirname(fileURLToPath(import.meta.url)), '../../static/schemas');
mkdirSync(folder, { recursive: true });
for (const [name, text] of Object.entries(PUBLISHED_SCHEMAS)) writeFileSync(join(folder, name), text);
