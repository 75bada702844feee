import { sql } from 'drizzle-orm';

/** Leases run on the database's clock, on which all processes agree; the session's own zone does not matter. */
export const databaseNow = sql`utc_timestamp(3)`;

export const databaseIn = (seconds: number) => sql`utc_timestamp(3) + interval ${seconds} second`;

/**
 * What a worker may believe about its own lease. Counted from before the claim was sent, on a clock that nobody sets, so it
 * ends a little before the database's.
 */
export class Lease {
	#endsAt: number;

	constructor(
		readonly token: string,
		readonly seconds: number,
		began: number = performance.now()
	) {
		this.#endsAt = began + seconds * 1000;
	}

	/** After a renewal that was sent at `began`. */
	renewed(began: number): void {
		this.#endsAt = began + this.seconds * 1000;
	}

	secondsLeft(): number {
		return (this.#endsAt - performance.now()) / 1000;
	}
}
