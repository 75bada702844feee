import { SegmentedMessage } from 'sms-segments-calculator';

export interface TextSize {
	/** Characters as a person counts them. */
	readonly characters: number;
	readonly encoding: 'GSM-7' | 'UCS-2';
	/** Parts that the provider bills and a telephone joins. */
	readonly segments: number;
	/** Characters that force the shorter UCS-2 parts, each once. */
	readonly outsideGsm: readonly string[];
}

/**
 * How a text message is cut: 160 characters (153 in parts) in GSM-7, 70 (67 in parts) where one character needs UCS-2
 * (3GPP TS 23.038 and 23.040, through the package).
 * Example: `textSize('Hola, mañana')` is 12 characters, GSM-7, 1 segment.
 */
export function textSize(text: string): TextSize {
	const message = new SegmentedMessage(text, 'auto');
	return {
		characters: message.numberOfCharacters,
		encoding: message.getEncodingName() === 'GSM-7' ? 'GSM-7' : 'UCS-2',
		segments: message.segmentsCount,
		outsideGsm: [...new Set(message.getNonGsmCharacters())]
	};
}
