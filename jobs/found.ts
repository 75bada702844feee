import { parseArgs } from 'node:util';
import { z } from 'zod';
import { STANDARD_IDS } from '../src/lib/domain/guideline/types';
import { systemClock } from '../src/lib/server/clock';
import { getConfig } from '../src/lib/server/config';
import { openDatabase } from '../src/lib/server/db/client';
import { createLog } from '../src/lib/server/log';
import { systemRandom } from '../src/lib/server/random';
import { foundOrganisation } from '../src/lib/server/services/founding';

const USAGE = `Begins an organisation and invites its first administrator.

  npm run found -- --organisation NAME --administrator NAME --email ADDRESS
                   [--standard aap-2022|nice-cg98] [--emergency NUMBER]

Prints a link through which the administrator sets a password; it is good for seven days.`;

const asked = z.object({
	organisation: z.string().trim().min(2).max(160),
	administrator: z.string().trim().min(2).max(120),
	email: z.email(),
	standard: z.enum(STANDARD_IDS),
	emergency: z.string().trim().min(2).max(20)
});

function readArguments() {
	const text = { type: 'string' } as const;
	const { values } = parseArgs({
		options: {
			organisation: text,
			administrator: text,
			email: text,
			standard: { ...text, default: 'aap-2022' },
			emergency: { ...text, default: '911' }
		}
	});
	return asked.parse(values);
}

async function main(): Promise<void> {
	const { organisation, administrator, email, standard, emergency } = readArguments();
	const config = getConfig();
	const database = openDatabase(config.databaseUrl);
	try {
		const ctx = { db: database.db, clock: systemClock, random: systemRandom, log: createLog('warn'), config };
		const founded = await foundOrganisation(ctx, {
			organisationName: organisation,
			standard,
			emergencyNumber: emergency,
			administratorName: administrator,
			administratorEmail: email
		});
		console.log(founded.ok ? founded.value.link : `Not done: ${JSON.stringify(founded.error)}`);
		process.exitCode = founded.ok ? 0 : 1;
	} finally {
		await database.close();
	}
}

try {
	await main();
} catch (error) {
	const isMisuse = error instanceof z.ZodError || (error instanceof TypeError && 'code' in error);
	console.error(isMisuse ? USAGE : error);
	process.exitCode = 2;
}
