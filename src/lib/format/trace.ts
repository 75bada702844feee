import type { Assessment, MeasurementAssessment, TraceStep } from '../domain/guideline/types';
import { formatDayTime, formatZone } from './time';
import { formatBilirubin, methodLabel } from './values';

/** One step of a trace for people: the same step, with instants on the site's clock and values by their name. */
export interface TraceLine {
	readonly says: string;
	readonly inputs: readonly { readonly name: string; readonly value: string }[];
	readonly output: string;
	readonly source: string;
	/** How sure the source is. */
	readonly sure: string;
}

const SURE: Record<TraceStep['confidence'], string> = {
	printed: 'as printed',
	transcribed: 'as in public copies',
	'from memory': 'from memory, not checked against the print',
	'common practice, no source': 'common practice, no source',
	'our reading': 'our reading of the text'
};
const INSTANT = /\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(?:\.\d+)?Z/g;
const MEASUREMENT = /bilirubin\[(\d+)\]/g;

/** "phototherapyStoppedAt" as "phototherapy stopped at". */
const nameWords = (key: string): string => key.replace(/([a-z])([A-Z])/g, '$1 $2').toLowerCase();

function measurementWords(held: MeasurementAssessment, timeZone: string): string {
	const { method, total, unit, at } = held.measurement;
	return `${methodLabel(method)} ${formatBilirubin({ value: total, unit })} of ${formatDayTime(at, { timeZone })}`;
}

/** Every step in order; nothing is left out and nothing added but the clock and the names of the values. */
export function traceLines(
	{ trace, measurements }: Pick<Assessment, 'trace' | 'measurements'>,
	timeZone: string
): TraceLine[] {
	const localWords = (iso: string): string => {
		const at = new Date(iso);
		return `${formatDayTime(at, { timeZone })} ${formatZone(timeZone, at)}`;
	};
	const readable = (text: string): string =>
		text.replace(INSTANT, localWords).replace(MEASUREMENT, (whole, index: string) => {
			const held = measurements[Number(index)];
			return held ? measurementWords(held, timeZone) : whole;
		});
	return trace.map(({ says, inputs, output, source, confidence }) => ({
		says,
		inputs: Object.entries(inputs).map(([name, value]) => ({
			name: nameWords(name),
			value: readable(String(value))
		})),
		output: readable(output),
		source,
		sure: SURE[confidence]
	}));
}
