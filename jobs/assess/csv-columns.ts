/** The form of a CSV file of newborns: our own, a row each, lists inside a cell. */
export const CSV_COLUMNS = [
	'id',
	'standard',
	'gestationalAge',
	'bornAt',
	'dischargeAt',
	'neurotoxicityRisks',
	'jaundiceRisks',
	'feeding',
	'albuminGramsPerDecilitre',
	'bilirubin',
	'phototherapy'
] as const;

const REQUIRED = new Set<string>(CSV_COLUMNS.filter((name) => name !== 'albuminGramsPerDecilitre'));

export const CSV_HELP = `CSV: a header with the columns below in any order (albuminGramsPerDecilitre may be left out), comma-separated,
UTF-8, cells quoted where they hold commas. Items of a list are parted by ";", the parts of an item by "|":

  ${CSV_COLUMNS.join(',')}

  neurotoxicityRisks, jaundiceRisks   risk;risk
  bilirubin                           at|method|total|direct|unit;...   direct may be empty
  phototherapy                        from|to|setting;...               to is empty while it runs

  b-1,aap-2022,38+4,2026-03-01T04:10:00+01:00,2026-03-03T11:00:00+01:00,,,breast,,2026-03-02T16:10:00+01:00|serum|9.8||mg/dL,
`;

/** What keeps a header from being read; null when nothing does. */
export function headerProblem(header: readonly string[]): string | null {
	const missing = [...REQUIRED].filter((name) => !header.includes(name));
	if (missing.length > 0) return `The header lacks ${missing.join(', ')}.`;
	const known = new Set<string>(CSV_COLUMNS);
	const strange = header.filter((name) => !known.has(name));
	if (strange.length > 0) return `The header has unknown columns: ${strange.join(', ')}.`;
	return new Set(header).size < header.length ? 'The header names a column twice.' : null;
}

const list = (cell: string): string[] =>
	cell.trim() === '' ? [] : cell.split(';').map((item) => item.trim());

/** A number as written; anything else stays text, so that the schema refuses it by name. */
function number(text: string): number | string {
	return /^-?\d+(\.\d+)?$/.test(text) ? Number(text) : text;
}

function measurement(item: string): unknown {
	const [at, method, total, direct, unit, ...more] = item.split('|').map((part) => part.trim());
	if (unit === undefined || more.length > 0) return item;
	return { at, method, total: number(total ?? ''), ...(direct ? { direct: number(direct) } : {}), unit };
}

function course(item: string): unknown {
	const [from, to, setting, ...more] = item.split('|').map((part) => part.trim());
	if (setting === undefined || more.length > 0) return item;
	return { from, ...(to ? { to } : {}), setting };
}

/** A row to the shape of a JSON record, not yet checked. */
export function recordOfRow(row: Readonly<Record<string, string>>): unknown {
	const cell = (name: (typeof CSV_COLUMNS)[number]): string => (row[name] ?? '').trim();
	const albumin = cell('albuminGramsPerDecilitre');
	return {
		id: cell('id'),
		standard: cell('standard'),
		gestationalAge: cell('gestationalAge'),
		bornAt: cell('bornAt'),
		dischargeAt: cell('dischargeAt'),
		neurotoxicityRisks: list(cell('neurotoxicityRisks')),
		jaundiceRisks: list(cell('jaundiceRisks')),
		feeding: cell('feeding'),
		...(albumin === '' ? {} : { albuminGramsPerDecilitre: number(albumin) }),
		bilirubin: list(cell('bilirubin')).map(measurement),
		phototherapy: list(cell('phototherapy')).map(course)
	};
}
