/** How the outbox works; tests scale the times down. */
export interface OutboxSettings {
	/** Messages taken by one claim. */
	readonly batch: number;
	/** Calls to one provider at a time, from one worker. */
	readonly concurrency: number;
	/** A claim holds this long without being renewed. */
	readonly leaseSeconds: number;
	/** A call that has no answer by then counts as unknown. Well below the lease: a call never outlives its claim. */
	readonly callSeconds: number;
	/** After an answer was lost, the provider is asked only then: what it just took may not be in its list yet. */
	readonly settleSeconds: number;
	/** Pause of a broken provider, and the time for one try of it. */
	readonly breakerSeconds: number;
	/** Outcomes wait this long for others, to be recorded together. */
	readonly gatherMilliseconds: number;
	/** Highest rates, shared by all workers; null for none. */
	readonly perSecond: { readonly sms: number | null; readonly mail: number | null };
}

export const DEFAULT_OUTBOX_SETTINGS: OutboxSettings = {
	batch: 100,
	concurrency: 16,
	leaseSeconds: 60,
	callSeconds: 10,
	settleSeconds: 20,
	breakerSeconds: 15,
	gatherMilliseconds: 75,
	perSecond: { sms: 50, mail: 50 }
};
