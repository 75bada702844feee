/** The part of the UCUM library that the tests use; it brings no types of its own. */
declare module '@lhncbc/ucum-lhc' {
	interface Conversion {
		readonly status: 'succeeded' | 'failed' | 'error';
		readonly toVal: number | null;
		readonly msg: readonly string[];
	}
	export const UcumLhcUtils: {
		getInstance(): {
			convertUnitTo(
				fromUnit: string,
				value: number,
				toUnit: string,
				options: { readonly molecularWeight: number }
			): Conversion;
		};
	};
}
