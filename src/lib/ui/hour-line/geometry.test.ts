import { describe, expect, it } from 'vitest';
import {
	CURVE_BOX,
	curveAt,
	curvePath,
	dayMarks,
	hourLineScales,
	hourTicks,
	isPastWindow,
	projection,
	stretch
} from './geometry';
import { LANES } from './lanes';
import type { HourLineModel } from './model';
import { changeSpan, hourLineSpan } from './span';

const HOUR = 3_600_000;
const bornAt = new Date('2026-03-06T15:00:00Z'); // Friday 09:00 in Chicago, two days before the clocks change
const hour = (hours: number): Date => new Date(bornAt.getTime() + hours * HOUR);
const curve = [0, 24, 48, 72, 96, 120].map((at) => ({
	hour: at,
	phototherapy: 8 + at / 12,
	exchange: 18 + at / 24
}));
const model: HourLineModel = {
	bornAt,
	timeZone: 'America/Chicago',
	now: hour(50),
	fromHour: 0,
	untilHour: 120,
	unit: 'mg/dL',
	curve
};

describe('scales', () => {
	it('puts birth at the start, the last hour at the end, and nought on the floor of the plot', () => {
		const scales = hourLineScales(model, 'full');
		expect([scales.x(0), scales.x(60), scales.x(120)]).toEqual([0, 50, 100]);
		expect(scales.y(0)).toBe(LANES.full.plotBottom);
	});

	it('keeps a value above every line inside the plot', () => {
		const high = { ...model, measurements: [{ at: hour(40), method: 'serum' as const, total: 31 }] };
		expect(hourLineScales(high, 'row').y(31)).toBeGreaterThanOrEqual(LANES.row.plotTop);
	});
});

describe('curves', () => {
	it('reads between the points and not beyond them', () => {
		expect(curveAt(curve, 36)).toEqual({ hour: 36, phototherapy: 11, exchange: 19.5 });
		expect(curveAt(curve, 121)).toBeNull();
	});

	it('begins and ends exactly at the edges of the picture', () => {
		const part = { ...model, fromHour: 12, untilHour: 36 };
		const path = curvePath(part, hourLineScales(part, 'full'), (p) => p.phototherapy);
		const xs = path.match(/[ML]([\d.]+),/g)?.map((step) => Number(step.slice(1, -1)));
		expect(xs).toEqual([0, 500, CURVE_BOX]);
	});

	it('draws nothing for a line that the standard does not have', () => {
		expect(curvePath(model, hourLineScales(model, 'full'), (p) => p.escalation)).toBe('');
	});
});

describe('days and hours', () => {
	it('marks local midnights, also over the change to summer time', () => {
		const marks = dayMarks(model, hourLineScales(model, 'full'));
		const hours = marks.filter((mark) => mark.isMidnight).map((mark) => Math.round((mark.x / 100) * 120));
		expect(hours).toEqual([15, 39, 62, 86, 110]);
		expect(marks.map((mark) => mark.label)).toContain('Sun 8');
	});

	it('never crowds the axis', () => {
		for (const untilHour of [12, 48, 120, 336, 1440]) {
			expect(hourTicks({ ...model, untilHour }).length).toBeLessThanOrEqual(15);
		}
	});
});

describe('stretches', () => {
	const scales = hourLineScales(model, 'row');
	it('cuts a stretch at the edges and says so', () => {
		expect(stretch(model, scales, hour(96), hour(144))).toEqual({
			x: 80,
			width: 20,
			startsInside: true,
			endsInside: false
		});
	});
	it('leaves out what lies outside', () => {
		expect(stretch(model, scales, hour(130), hour(140))).toBeNull();
	});
	it('calls a window past only when it is over and unmet', () => {
		const window = { from: hour(24), until: hour(49), met: false };
		expect(isPastWindow({ ...model, window })).toBe(true);
		expect(isPastWindow({ ...model, window: { ...window, met: true } })).toBe(false);
		expect(isPastWindow({ ...model, window: { ...window, until: hour(51) } })).toBe(false);
		expect(isPastWindow(model)).toBe(false);
	});
});

describe('projection', () => {
	const measurements = [
		{ at: hour(24), method: 'serum' as const, total: 6 },
		{ at: hour(36), method: 'serum' as const, total: 9 }
	];
	const rate = {
		fromIndex: 0,
		toIndex: 1,
		perHour: 0.25,
		unit: 'mg/dL' as const,
		limitPerHour: 0.2,
		exceedsLimit: true
	};
	it('runs from the last value to the crossing at the rate', () => {
		const rising = { ...model, measurements, rates: [{ ...rate, projectedCrossingAt: hour(48) }] };
		const scales = hourLineScales(rising, 'full');
		expect(projection(rising, scales)).toEqual({
			x1: scales.x(36),
			y1: scales.y(9),
			x2: scales.x(48),
			y2: scales.y(12)
		});
	});
	it('is absent when the engine projects none', () => {
		expect(projection({ ...model, measurements, rates: [rate] }, hourLineScales(model, 'full'))).toBeNull();
	});
});

describe('spans', () => {
	it('shows at least five days, and slides for late things', () => {
		expect(hourLineSpan({ ...model })).toEqual({ fromHour: 0, untilHour: 120 });
		const late = hourLineSpan({ ...model, now: hour(500) });
		expect(late.untilHour - late.fromHour).toBe(336);
		expect(late.untilHour).toBeGreaterThanOrEqual(500);
	});

	it('zooms around now and never before birth', () => {
		const closer = changeSpan(model, 'in', 50);
		expect(closer.untilHour - closer.fromHour).toBe(80);
		expect(closer.fromHour).toBeLessThan(50);
		expect(closer.untilHour).toBeGreaterThan(50);
		expect(changeSpan(model, 'earlier', 50)).toEqual({ fromHour: 0, untilHour: 120 });
		expect(changeSpan(model, 'later', 50)).toEqual({ fromHour: 30, untilHour: 150 });
		expect(changeSpan({ fromHour: 10, untilHour: 22 }, 'in', 12)).toEqual({ fromHour: 10, untilHour: 22 });
	});
});
