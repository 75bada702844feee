import { createReadStream, statSync } from 'node:fs';
import { HELP, readOptions, type AssessOptions } from './assess/options';
import { startProgress } from './assess/progress';
import { runBatch } from './assess/run';
import { UnreadableInput } from './assess/unreadable-input';

/** Assesses a file of newborns for quality teams; see HELP. Needs no database, no build and no settings. */

const REFUSED = 1;
const UNREADABLE = 2;
const PIECE_BYTES = 1 << 18;

async function main(options: AssessOptions): Promise<number> {
	const { file, format, withTrace } = options;
	// Asked for first: a stream of a file that is not there fails later, where nobody waits for it.
	const totalBytes = file === undefined ? null : statSync(file).size;
	const input = file === undefined ? process.stdin : createReadStream(file, { highWaterMark: PIECE_BYTES });
	const progress = startProgress(process.stderr, totalBytes);
	const notAfter = new Date();
	try {
		const counts = await runBatch({
			input,
			format,
			output: process.stdout,
			errors: process.stderr,
			progress,
			options: { withTrace, notAfter }
		});
		return counts.refused > 0 ? REFUSED : 0;
	} finally {
		progress.stop();
	}
}

function explain(cause: unknown): string {
	if (cause instanceof UnreadableInput) return `The input cannot be read: ${cause.message}`;
	if (cause instanceof Error && 'code' in cause) return `The input cannot be read: ${cause.message}`;
	throw cause;
}

// A reader that stops early ("| head") closes the pipe: nothing is wrong then, there is only nobody to write to.
process.stdout.on('error', (cause: NodeJS.ErrnoException) => {
	if (cause.code === 'EPIPE') process.exit(0);
	throw cause;
});

const options = readOptions(process.argv.slice(2));
if (options === null) process.stdout.write(HELP);
else if (typeof options === 'string') {
	process.stderr.write(`${options}\nSee npm run assess -- --help\n`);
	process.exitCode = UNREADABLE;
} else {
	process.exitCode = await main(options).catch((cause: unknown) => {
		process.stderr.write(`${explain(cause)}\n`);
		return UNREADABLE;
	});
}
