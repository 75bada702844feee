import { z } from 'zod';

const recordId = z.string().regex(/^[a-z2-7]{16}$/, 'Choose one from the list.');

/** A new calendar feed: of which clinic. */
export const feedSchema = z.object({ siteId: recordId });

/** A feed that is to end. */
export const feedEndSchema = z.object({ id: recordId });
