declare module 'silabify' {
	/** Syllables of one Spanish word. */
	export default function silabify(word: string): string[];
}
