import { scaleLinear } from 'd3-scale';
import { curveLinear, line } from 'd3-shape';
import { DateTime } from 'luxon';
import type { CurvePoint } from '../../domain/guideline/types';
import { ageHoursAt } from '../../format/duration';
import { LANES } from './lanes';
import type { HourLineModel, HourLineSize } from './model';

/** Curves are drawn in a box this wide that is stretched to the place; everything else lies at percentages. */
export const CURVE_BOX = 1000;

export interface Scales {
	/** Hours since birth to percent of the width; not clamped. */
	readonly x: (hour: number) => number;
	/** Concentration to pixels from the top. */
	readonly y: (value: number) => number;
	readonly yTicks: readonly number[];
	/** True when the hour is on the picture. */
	readonly shows: (hour: number) => boolean;
}

/** Threshold values at an hour, linear between the points of the curve; null outside it. */
export function curveAt(curve: readonly CurvePoint[], hour: number): CurvePoint | null {
	const after = curve.findIndex((point) => point.hour >= hour);
	const right = curve[after];
	if (!right) return null;
	if (right.hour === hour) return right;
	const left = curve[after - 1];
	if (!left) return null;
	const share = (hour - left.hour) / (right.hour - left.hour);
	const between = (a: number, b: number): number => a + (b - a) * share;
	const escalation =
		left.escalation !== undefined && right.escalation !== undefined
			? { escalation: between(left.escalation, right.escalation) }
			: {};
	return {
		hour,
		phototherapy: between(left.phototherapy, right.phototherapy),
		exchange: between(left.exchange, right.exchange),
		...escalation
	};
}

/** The highest concentration that must fit: every measurement, and each line that this size draws. */
function ceiling(model: HourLineModel, size: HourLineSize): number {
	const shown = (model.curve ?? []).filter(
		({ hour }) => hour >= model.fromHour - 1 && hour <= model.untilHour + 1
	);
	const lines = shown.map((point) => (size === 'full' ? point.exchange : point.phototherapy));
	const highest = Math.max(0, ...lines, ...(model.measurements ?? []).map(({ total }) => total));
	return highest > 0 ? highest * 1.08 : 1;
}

/** Scales of a picture; the y axis starts at nought so that heights compare. */
export function hourLineScales(model: HourLineModel, size: HourLineSize): Scales {
	const lanes = LANES[size];
	const x = scaleLinear([model.fromHour, model.untilHour], [0, 100]);
	const y = scaleLinear([0, ceiling(model, size)], [lanes.plotBottom, lanes.plotTop]);
	return {
		x: (hour) => x(hour),
		y: (value) => y(value),
		yTicks: y.ticks(6),
		shows: (hour) => hour >= model.fromHour && hour <= model.untilHour
	};
}

/** SVG path of one threshold line inside the curve box, the part outside the picture left out. */
export function curvePath(
	model: HourLineModel,
	scales: Scales,
	value: (point: CurvePoint) => number | undefined
): string {
	const curve = model.curve ?? [];
	const inside = curve.filter(({ hour }) => scales.shows(hour));
	const ends = [model.fromHour, model.untilHour].map((hour) => curveAt(curve, hour));
	const points = [ends[0], ...inside, ends[1]]
		.filter((point) => point !== null && point !== undefined)
		.flatMap((point) => {
			const height = value(point);
			return height === undefined ? [] : [{ hour: point.hour, height }];
		});
	const draw = line<{ hour: number; height: number }>()
		.x((point) => (scales.x(point.hour) / 100) * CURVE_BOX)
		.y((point) => scales.y(point.height))
		.curve(curveLinear);
	return draw(points) ?? '';
}

export interface DayMark {
	/** Percent of the width; of local midnight, or of birth for the first day. */
	readonly x: number;
	readonly label: string;
	/** True for labels that also fit on a narrow screen. */
	readonly always: boolean;
	readonly isMidnight: boolean;
}

/** Local midnights inside the picture, each with its date; correct over changes of the clock. */
export function dayMarks(model: HourLineModel, scales: Scales, locale = 'en', every = 1): DayMark[] {
	const born = DateTime.fromJSDate(model.bornAt, { zone: model.timeZone }).setLocale(locale);
	const first = born.plus({ hours: model.fromHour });
	const midnights: DateTime[] = [];
	for (let day = first.startOf('day'); scales.x(hoursFrom(born, day)) <= 100; day = day.plus({ days: 1 })) {
		midnights.push(day);
	}
	const narrowStep = Math.max(every, Math.ceil(midnights.length / 5));
	const wideStep = Math.max(every, Math.ceil(midnights.length / 15));
	return midnights.map((day, i) => {
		const hour = hoursFrom(born, day);
		const isMidnight = hour >= model.fromHour;
		const x = isMidnight ? scales.x(hour) : 0;
		return {
			x,
			label: i % wideStep === 0 && x < 95 ? day.toFormat('ccc d') : '',
			always: i % narrowStep === 0 && x < 86,
			isMidnight
		};
	});
}

function hoursFrom(born: DateTime, at: DateTime): number {
	return at.diff(born, 'hours').hours;
}

/** Round hours for the axis of the full picture: 6, 12, 24 or more apart, as the stretch allows. */
export function hourTicks(model: HourLineModel): number[] {
	const length = model.untilHour - model.fromHour;
	const step = [3, 6, 12, 24, 48, 96].find((hours) => length / hours <= 14) ?? 168;
	const ticks: number[] = [];
	for (let hour = Math.ceil(model.fromHour / step) * step; hour <= model.untilHour; hour += step)
		ticks.push(hour);
	return ticks;
}

export interface Stretch {
	readonly x: number;
	readonly width: number;
	readonly startsInside: boolean;
	readonly endsInside: boolean;
}

/** The part of a stretch of time that lies on the picture; null when none does. */
export function stretch(model: HourLineModel, scales: Scales, from: Date, until: Date): Stretch | null {
	const start = ageHoursAt(model.bornAt, from);
	const end = ageHoursAt(model.bornAt, until);
	if (end < model.fromHour || start > model.untilHour) return null;
	const x = scales.x(Math.max(start, model.fromHour));
	const right = scales.x(Math.min(end, model.untilHour));
	return { x, width: right - x, startsInside: start >= model.fromHour, endsInside: end <= model.untilHour };
}

/** True when the window is over and the newborn was not seen for it. */
export function isPastWindow(model: HourLineModel): boolean {
	const { window, now } = model;
	return window !== null && window !== undefined && !window.met && now.getTime() > window.until.getTime();
}

export interface Segment {
	readonly x1: number;
	readonly y1: number;
	readonly x2: number;
	readonly y2: number;
}

/**
 * The dashed line from the measurement that ends a rate to where, at that rate, it would meet the phototherapy
 * threshold. Null when the rate projects no crossing. A projection, never a finding.
 */
export function projection(model: HourLineModel, scales: Scales): Segment | null {
	const rate = model.rates?.at(-1);
	const last = rate ? model.measurements?.[rate.toIndex] : undefined;
	if (!rate?.projectedCrossingAt || !last) return null;
	const start = ageHoursAt(model.bornAt, last.at);
	const crossing = ageHoursAt(model.bornAt, rate.projectedCrossingAt);
	if (crossing <= start) return null;
	const value = (hour: number): number => last.total + rate.perHour * (hour - start);
	return {
		x1: scales.x(start),
		y1: scales.y(value(start)),
		x2: scales.x(crossing),
		y2: scales.y(value(crossing))
	};
}
