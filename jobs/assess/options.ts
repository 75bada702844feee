import { parseArgs } from 'node:util';
import { CSV_HELP } from './csv-columns';

export interface AssessOptions {
	readonly format: 'json' | 'csv';
	readonly withTrace: boolean;
	/** Absent: standard input. */
	readonly file: string | undefined;
}

export const HELP = `Assesses many newborns by a published standard, one result a line.

  npm run assess -- [--format json|csv] [--trace] [FILE]

FILE, or standard input when it is left out, holds one newborn a line (json, the default) or a row (csv).
The results go to standard output, one JSON object a line, in the same order. Use "npm run --silent assess"
when the output is piped on, so that npm adds nothing to it.

  --format json|csv   form of the input
  --trace             add the steps of the reasoning and their sources
  --help              this text

A refused record is named on standard error with its line and reason, and a line {"id", "error"} takes its place.
Exit status: 0 when every record was assessed, 1 when any was refused, 2 when the input could not be read.

The fields of a JSON record are published in static/schemas/assessment-input.schema.json, those of a result in
static/schemas/assessment-output.schema.json.

${CSV_HELP}
The values come from public copies of the standards and are to be signed off by a qualified clinician before
they are used for patients. A result is an aid: clinical judgement and local policy come first.
`;

/** The command's options, or what is wrong with them, or null when help was asked for. */
export function readOptions(args: readonly string[]): AssessOptions | string | null {
	try {
		const { values, positionals } = parseArgs({
			args: [...args],
			allowPositionals: true,
			options: {
				format: { type: 'string', default: 'json' },
				trace: { type: 'boolean', default: false },
				help: { type: 'boolean', short: 'h', default: false }
			}
		});
		if (values.help) return null;
		if (values.format !== 'json' && values.format !== 'csv')
			return `--format is json or csv, not ${values.format}.`;
		if (positionals.length > 1) return 'Give one file, or none for standard input.';
		return { format: values.format, withTrace: values.trace, file: positionals[0] };
	} catch (cause) {
		return cause instanceof Error ? cause.message : String(cause);
	}
}
