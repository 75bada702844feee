import type { JaundiceRisk, NeurotoxicityRisk } from './types';

/** A risk factor as a form shows it. */
export interface RiskDefinition {
	readonly label: string;
	readonly definition: string;
	readonly source: string;
}

const NEUROTOXICITY = 'AAP 2022, neurotoxicity risk factors (four public copies)';
const JAUNDICE = 'AAP 2022, risk factors for significant hyperbilirubinemia';

/** Below it albumin is low, listed as a risk or not: AAP 2022, neurotoxicity risk factors (four public copies). */
export const LOW_ALBUMIN_GRAMS_PER_DECILITRE = 3.0;

/** Risk factors that choose the lower lines (AAP). Below 38 weeks is one too, but the lines already carry it. */
export const NEUROTOXICITY_RISK_DEFINITIONS: Readonly<Record<NeurotoxicityRisk, RiskDefinition>> = {
	'isoimmune-hemolysis': {
		label: 'Isoimmune hemolytic disease',
		definition:
			'Positive direct antiglobulin test. A test positive only to anti-Rh(D) after Rh immune globulin in this pregnancy, with a mother who was antibody-negative before, may be treated as negative.',
		source: `${NEUROTOXICITY}; the exception from a hospital pathway`
	},
	'g6pd-deficiency': {
		label: 'G6PD deficiency',
		definition: 'Known deficiency of glucose-6-phosphate dehydrogenase.',
		source: NEUROTOXICITY
	},
	'other-hemolysis': {
		label: 'Other hemolytic condition',
		definition:
			'Any other condition with increased breakdown of red cells, for instance hereditary spherocytosis.',
		source: NEUROTOXICITY
	},
	sepsis: { label: 'Sepsis', definition: 'Sepsis, proven or treated as such.', source: NEUROTOXICITY },
	'clinical-instability': {
		label: 'Clinical instability',
		definition: 'Significant clinical instability in the last 24 hours.',
		source: NEUROTOXICITY
	},
	'low-albumin': {
		label: 'Low albumin',
		definition: 'Serum albumin below 3.0 g/dL. An albumin value below 3.0 counts even if this is not ticked.',
		source: NEUROTOXICITY
	}
};

/** Risk factors for developing significant hyperbilirubinemia: they raise attention, they do not choose the line. */
export const JAUNDICE_RISK_DEFINITIONS: Readonly<Record<JaundiceRisk, RiskDefinition>> = {
	'jaundice-in-first-24-hours': {
		label: 'Jaundice in the first 24 hours',
		definition: 'Yellow skin or eyes seen before 24 hours of age.',
		source: `${JAUNDICE}; NICE CG98`
	},
	'predischarge-bilirubin-near-threshold': {
		label: 'Value close to the line before discharge',
		definition: 'Transcutaneous or serum bilirubin before discharge close to the phototherapy line.',
		source: `${JAUNDICE}, from memory`
	},
	'hemolysis-suspected': {
		label: 'Hemolysis suspected',
		definition:
			'Hemolysis from any cause suspected, or a rise of 0.3 mg/dL an hour or more in the first 24 hours, 0.2 or more after.',
		source: JAUNDICE
	},
	'phototherapy-before-discharge': {
		label: 'Phototherapy before discharge',
		definition:
			'Treated by phototherapy in the birth stay. Enter the course as well: it changes the follow-up.',
		source: `${JAUNDICE}, from memory`
	},
	'sibling-or-parent-treated': {
		label: 'Brother, sister or parent was treated',
		definition: 'A parent or sibling needed phototherapy or exchange transfusion.',
		source: `${JAUNDICE}; NICE CG98 (sibling)`
	},
	'family-red-cell-disorder': {
		label: 'Red-cell disorder in the family',
		definition:
			'Family history or ancestry that suggests an inherited red-cell disorder, including G6PD deficiency.',
		source: JAUNDICE
	},
	'exclusive-breastfeeding-low-intake': {
		label: 'Exclusive breastfeeding with low intake',
		definition: 'Breastfed only, with too little milk taken: weight loss, few wet diapers, few feeds.',
		source: JAUNDICE
	},
	'scalp-hematoma-or-bruising': {
		label: 'Scalp hematoma or bruising',
		definition: 'Cephalhematoma, subgaleal bleed or significant bruising.',
		source: JAUNDICE
	},
	'down-syndrome': {
		label: 'Down syndrome',
		definition: 'Trisomy 21, known or suspected.',
		source: `${JAUNDICE}, from memory`
	},
	'macrosomia-maternal-diabetes': {
		label: 'Large newborn of a mother with diabetes',
		definition: 'Macrosomic newborn of a mother with diabetes.',
		source: `${JAUNDICE}, from memory`
	},
	'ceftriaxone-or-sulfonamide': {
		label: 'Ceftriaxone or a sulfonamide',
		definition:
			'Given or planned. These displace bilirubin from albumin. Not part of the published list; shown as a caution.',
		source: 'US label of ceftriaxone (secondary copy); secondary copies on sulfonamides'
	},
	'lipid-infusion': {
		label: 'Lipid infusion',
		definition: 'Free fatty acids compete for albumin. Not part of the published list; shown as a caution.',
		source: 'common practice, no source'
	}
};
