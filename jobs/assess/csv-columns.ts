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

/** From a header that was found good to the function that turns a row's cells into a JSON record, not yet checked. */
export function recordReader(header: readonly string[]): (cells: readonly string[]) => unknown {
	const places = new Map(header.map((name, place) => [name, place]));
	const cellOf = (name: (typeof CSV_COLUMNS)[number]) => {
		const place = places.get(name) ?? -1;
		return (cells: readonly string[]): string => (cells[place] ?? '').trim();
	};
	const id = cellOf('id');
	const standard = cellOf('standard');
	const gestationalAge = cellOf('gestationalAge');
	const bornAt = cellOf('bornAt');
	const dischargeAt = cellOf('dischargeAt');
	const neurotoxicityRisks = cellOf('neurotoxicityRisks');
	const jaundiceRisks = cellOf('jaundiceRisks');
	const feeding = cellOf('feeding');
	const albuminGramsPerDecilitre = cellOf('albuminGramsPerDecilitre');
	const bilirubin = cellOf('bilirubin');
	const phototherapy = cellOf('phototherapy');
	return (cells) => {
		const albumin = albuminGramsPerDecilitre(cells);
		return {
			id: id(cells),
			standard: standard(cells),
			gestationalAge: gestationalAge(cells),
			bornAt: bornAt(cells),
			dischargeAt: dischargeAt(cells),
			neurotoxicityRisks: partsOf(neurotoxicityRisks(cells), ';'),
			jaundiceRisks: partsOf(jaundiceRisks(cells), ';'),
			feeding: feeding(cells),
			...(albumin === '' ? {} : { albuminGramsPerDecilitre: number(albumin) }),
			bilirubin: partsOf(bilirubin(cells), ';').map(measurement),
			phototherapy: partsOf(phototherapy(cells), ';').map(course)
		};
	};
}

function partsOf(text: string, mark: ';' | '|'): string[] {
	if (text === '') return [];
	const parts = text.split(mark);
	for (let i = 0; i < parts.length; i++) parts[i] = (parts[i] ?? '').trim();
	return parts;
}

/** A number as written; anything else stays text, so that the schema refuses it by name. */
function number(text: string): number | string {
	return /^-?\d+(\.\d+)?$/.test(text) ? Number(text) : text;
}

function measurement(item: string): unknown {
	const [at, method, total = '', direct, unit, ...more] = partsOf(item, '|');
	if (unit === undefined || more.length > 0) return item;
	if (!direct) return { at, method, total: number(total), unit };
	return { at, method, total: number(total), direct: number(direct), unit };
}

function course(item: string): unknown {
	const [from, to, setting, ...more] = partsOf(item, '|');
	if (setting === undefined || more.length > 0) return item;
	return { from, ...(to ? { to } : {}), setting };
}
