import { z } from 'zod';
import { assessmentInputSchema, assessmentOutputSchema, refusedRecordSchema } from './assessment';

function published(schema: z.ZodType, io: 'input' | 'output'): string {
	return `${JSON.stringify(z.toJSONSchema(schema, { io, target: 'draft-2020-12' }), null, '\t')}\n`;
}

/** The JSON Schemas under static/schemas, by file name, as they must be written there. */
export const PUBLISHED_SCHEMAS: Readonly<Record<string, string>> = {
	'assessment-input.schema.json': published(assessmentInputSchema, 'input'),
	'assessment-output.schema.json': published(z.union([assessmentOutputSchema, refusedRecordSchema]), 'output')
};
