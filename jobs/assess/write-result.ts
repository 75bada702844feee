import type { Decision, Standard } from '../../src/lib/domain/guideline/standard';
import type { Caution } from '../../src/lib/domain/guideline/types';
import { shownHours } from '../../src/lib/domain/guideline/age';
import { writeInstant } from './write-instant';

/** Texts of cautions are fixed objects, so each is written once. */
const WRITTEN = new Map<Caution, string>();

function writeCaution(caution: Caution): string {
	const known = WRITTEN.get(caution);
	if (known !== undefined) return known;
	const { code, severity, text, source } = caution;
	const made = JSON.stringify({ code, severity, text, source });
	WRITTEN.set(caution, made);
	return made;
}

function writeCautions(cautions: readonly Caution[]): string {
	let text = '';
	for (const caution of cautions) text += text === '' ? writeCaution(caution) : `,${writeCaution(caution)}`;
	return text;
}

const HEADS = new Map<Standard, string>();

function writeHead(standard: Standard): string {
	const known = HEADS.get(standard);
	if (known !== undefined) return known;
	const made = `"standard":${JSON.stringify(standard.id)},"edition":${JSON.stringify(standard.edition)}`;
	HEADS.set(standard, made);
	return made;
}

/** The line of a result without trace: letter for letter what JSON.stringify makes of the published form. */
export function writeResult(id: string, decision: Decision, standard: Standard): string {
	const { deciding, outcome, cautions } = decision;
	return `{"id":${JSON.stringify(id)},${writeHead(standard)},${writeValue(deciding, standard)},"disposition":"${outcome.disposition}","window":${writeWindow(outcome)},"cautions":[${writeCautions(cautions)}]}`;
}

function writeValue(deciding: Decision['deciding'], standard: Standard): string {
	if (!deciding) return '"ageHours":null,"thresholds":null,"difference":null';
	const { phototherapy, escalation, exchange } = deciding.lines;
	const middle = Number.isNaN(escalation) ? '' : `"escalation":${escalation},`;
	return `"ageHours":${shownHours(deciding.ageMs)},"thresholds":{"phototherapy":${phototherapy},${middle}"exchange":${exchange},"unit":"${standard.unit}"},"difference":${deciding.difference}`;
}

function writeWindow({ fromMs, untilMs, test }: Decision['outcome']): string {
	if (Number.isNaN(untilMs)) return 'null';
	return `{"from":"${writeInstant(fromMs)}","until":"${writeInstant(untilMs)}","test":"${test}"}`;
}
