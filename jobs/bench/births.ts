/** Invented births for measuring: the same ones on every run. */

/** A small generator of even numbers in [0, 1), seeded (a linear congruential one; quality does not matter here). */
export function seeded(seed: number): () => number {
	let state = seed >>> 0;
	return () => {
		state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
		return state / 4_294_967_296;
	};
}

const HOUR_MS = 3_600_000;
const YEAR_MS = 365 * 24 * HOUR_MS;
const FIRST_BIRTH_MS = Date.UTC(2025, 0, 1);
const NEUROTOXICITY = ['isoimmune-hemolysis', 'g6pd-deficiency', 'sepsis', 'low-albumin'] as const;
const JAUNDICE = [
	'sibling-or-parent-treated',
	'scalp-hematoma-or-bruising',
	'exclusive-breastfeeding-low-intake'
] as const;

function offsetTime(ms: number): string {
	return `${new Date(ms + HOUR_MS).toISOString().slice(0, 19)}+01:00`;
}

function some<T>(random: () => number, share: number, all: readonly T[]): T[] {
	return random() < share ? all.slice(0, 1 + Math.floor(random() * 2)) : [];
}

/** One record of the published input form: one to three measurements, one in twelve treated, one in 500 impossible. */
export function invent(random: () => number, number: number): Record<string, unknown> {
	const isAap = random() < 0.8;
	const bornMs = FIRST_BIRTH_MS + Math.floor(random() * YEAR_MS);
	const dischargeHours = 20 + random() * 80;
	const unit = isAap ? 'mg/dL' : 'umol/L';
	const isImpossible = random() < 0.002;
	const bilirubin = Array.from({ length: 1 + Math.floor(random() * 3) }, (_, i) => {
		const hours = (isImpossible ? -10 : 8) + ((i + random()) * dischargeHours) / 3;
		const milligrams = 2 + hours * 0.12 + random() * 6;
		return {
			at: offsetTime(bornMs + Math.floor(hours * HOUR_MS)),
			method: random() < 0.5 ? 'serum' : 'transcutaneous',
			total: isAap ? Math.round(milligrams * 10) / 10 : Math.round(milligrams * 17.1),
			unit
		};
	});
	return {
		id: `birth-${number}`,
		standard: isAap ? 'aap-2022' : 'nice-cg98',
		gestationalAge: `${35 + Math.floor(random() * 7)}+${Math.floor(random() * 7)}`,
		bornAt: offsetTime(bornMs),
		dischargeAt: offsetTime(bornMs + Math.floor(dischargeHours * HOUR_MS)),
		neurotoxicityRisks: some(random, 0.08, NEUROTOXICITY),
		jaundiceRisks: some(random, 0.3, JAUNDICE),
		feeding: random() < 0.6 ? 'breast' : random() < 0.5 ? 'formula' : 'mixed',
		bilirubin,
		phototherapy:
			random() < 1 / 12
				? [
						{
							from: offsetTime(bornMs + 30 * HOUR_MS),
							to: offsetTime(bornMs + 50 * HOUR_MS),
							setting: dischargeHours > 50 ? 'birth-stay' : 'home'
						}
					]
				: []
	};
}
