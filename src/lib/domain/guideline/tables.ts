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

/** Points in order of age, and for each completed hour the place of the last point at or before it. */
export interface Curve {
	readonly points: readonly Point[];
	readonly placeAtHour: readonly number[];
}

/** Reads '0:40 72:130' as a curve; its points lie at whole hours. */
export function decodePoints(text: string): Curve {
	const points = text.split(' ').map((pair) => {
		const [hour, value] = pair.split(':');
		return { hour: Number(hour), value: Number(value) };
	});
	const placeAtHour: number[] = [];
	points.forEach(({ hour }, place) => {
		const until = points[place + 1]?.hour ?? hour + 1;
		for (let at = hour; at < until; at++) placeAtHour[at] = place;
	});
	return { points, placeAtHour };
}

/** The value of a curve at an age: straight between points, flat after the last; throws before the first. */
export function valueAt({ points, placeAtHour }: Curve, hours: number): number {
	const place = placeAtHour[Math.floor(hours)] ?? (hours > 0 ? points.length - 1 : -1);
	const before = points[place];
	if (!before || hours < before.hour) throw new RangeError(`the curve does not reach hour ${hours}`);
	const after = points[place + 1];
	if (!after) return before.value;
	return before.value + ((after.value - before.value) * (hours - before.hour)) / (after.hour - before.hour);
}
