/** Reads a curve written as its first value and one digit of rise a step: '64:221' is 64, 66, 68, 69. */
export function decodeHourly(text: string): readonly number[] {
	const colon = text.indexOf(':');
	let value = Number(text.slice(0, colon));
	const values = [value];
	for (let i = colon + 1; i < text.length; i++) {
		value += text.charCodeAt(i) - 48;
		values.push(value);
	}
	return values;
}

/** A point of a curve that is drawn by straight lines. */
export interface Point {
	readonly hour: number;
	readonly value: number;
}

/** Reads '0:40 72:130' as points. */
export function decodePoints(text: string): readonly Point[] {
	return text.split(' ').map((pair) => {
		const [hour, value] = pair.split(':');
		return { hour: Number(hour), value: Number(value) };
	});
}

/** The value of a curve at an age: straight between points, flat after the last; the first point must be at or before it. */
export function valueAt(points: readonly Point[], hours: number): number {
	let before = points[0];
	if (!before || hours < before.hour) throw new RangeError(`the curve does not reach hour ${hours}`);
	for (let i = 1; i < points.length; i++) {
		const point = points[i];
		if (!point) break;
		if (point.hour > hours) {
			return (
				before.value + ((point.value - before.value) * (hours - before.hour)) / (point.hour - before.hour)
			);
		}
		before = point;
	}
	return before.value;
}
