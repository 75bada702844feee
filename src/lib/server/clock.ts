/** The only source of the present instant; tests hand in one of their own. */
export interface Clock {
	now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };
