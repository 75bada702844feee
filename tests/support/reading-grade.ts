import { fleschKincaid } from 'flesch-kincaid';
import silabify from 'silabify';
import { syllable } from 'syllable';

// A type, not an interface: the package asks for an index signature, which only a type has by itself.
type Counts = { readonly sentence: number; readonly word: number; readonly syllable: number };

const WORD = /[\p{L}]+(?:['’][\p{L}]+)*/gu;

const sentencesOf = (text: string): string[] =>
	text.split(/[.!?…]+\s|[.!?…]+$|\n+/u).filter((part) => part.match(WORD) !== null);

function count(text: string, syllablesOf: (word: string) => number): Counts {
	const words = text.match(WORD) ?? [];
	return {
		sentence: sentencesOf(text).length,
		word: words.length,
		syllable: words.reduce((sum, word) => sum + syllablesOf(word.toLowerCase()), 0)
	};
}

/**
 * Flesch-Kincaid grade (Kincaid et al. 1975) by the packages `flesch-kincaid` and `syllable`: the school year in which an
 * English text is understood.
 */
export const englishGrade = (text: string): number => fleschKincaid(count(text, syllable));

/** A word that is not Spanish (STOP) stops the package: there each group of vowels is a syllable. */
function spanishSyllables(word: string): number {
	try {
		return silabify(word).length;
	} catch {
		return Math.max(1, word.match(/[aeiouáéíóúü]+/g)?.length ?? 0);
	}
}

/**
 * Crawford's grade for Spanish (Crawford 1984; coefficients from memory): from sentences and syllables per 100 words, the
 * syllables by the package `silabify`.
 */
export function spanishGrade(text: string): number {
	const { sentence, word, syllable: syllables } = count(text, spanishSyllables);
	return -0.205 * ((100 * sentence) / word) + 0.049 * ((100 * syllables) / word) - 3.407;
}

/** The longest sentence, in words. */
export function longestSentence(text: string): number {
	return Math.max(0, ...sentencesOf(text).map((sentence) => sentence.match(WORD)?.length ?? 0));
}
