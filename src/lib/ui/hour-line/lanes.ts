import type { HourLineSize } from './model';

/** Heights in pixels at which each layer lies; the width is always the width of the place. */
export interface Lanes {
	readonly height: number;
	readonly plotTop: number;
	readonly plotBottom: number;
	/** The line of hours. */
	readonly axis: number;
	readonly lamp: number;
	readonly window: number;
	readonly windowHeight: number;
	readonly visit: number;
	readonly checkIns: number;
	readonly messages: number;
	/** Baselines of the labels; null where the size has none. */
	readonly hourLabel: number | null;
	readonly dayLabel: number | null;
	readonly markRadius: number;
}

export const LANES: Record<HourLineSize, Lanes> = {
	row: {
		height: 48,
		plotTop: 4,
		plotBottom: 22,
		axis: 25,
		lamp: 22,
		window: 32,
		windowHeight: 6,
		visit: 32,
		checkIns: 43,
		messages: 43,
		hourLabel: null,
		dayLabel: null,
		markRadius: 3.5
	},
	card: {
		height: 150,
		plotTop: 8,
		plotBottom: 76,
		axis: 80,
		lamp: 76,
		window: 93,
		windowHeight: 10,
		visit: 93,
		checkIns: 111,
		messages: 125,
		hourLabel: null,
		dayLabel: 144,
		markRadius: 5
	},
	full: {
		height: 470,
		plotTop: 16,
		plotBottom: 330,
		axis: 334,
		lamp: 344,
		window: 363,
		windowHeight: 14,
		visit: 363,
		checkIns: 389,
		messages: 410,
		hourLabel: 438,
		dayLabel: 460,
		markRadius: 6
	},
	plain: {
		height: 116,
		plotTop: 0,
		plotBottom: 0,
		axis: 60,
		lamp: 60,
		window: 60,
		windowHeight: 0,
		visit: 34,
		checkIns: 78,
		messages: 78,
		hourLabel: null,
		dayLabel: 106,
		markRadius: 7
	}
};
