/**
 * What a status asks of the reader. Each tone has its own shape as well as its own colour:
 * `calm` outlined and round, `done` plain, `waits` amber with a heavy leading edge, `late` solid and square,
 * `danger` like late with hatching.
 */
export type Tone = 'calm' | 'done' | 'waits' | 'late' | 'danger';

export const TONE_CLASS: Record<Tone, string> = {
	calm: 'rounded-full border-field-edge text-ink-soft px-2.5',
	done: 'border-transparent text-ink-soft px-0',
	waits: 'rounded-sm border-waits-mark border-s-4 bg-waits-wash text-waits px-2',
	late: 'rounded-none border-late bg-late text-on-late px-2',
	danger: 'rounded-none border-late border-2 bg-late-wash text-late pe-2 hatched'
};
