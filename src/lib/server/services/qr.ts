import { create } from 'qrcode';

export interface QrPicture {
	/** Modules along one side, the quiet zone of four around it included. */
	readonly size: number;
	/** SVG path of the dark modules in a box of that size. */
	readonly path: string;
}

const QUIET = 4;

/** A QR code as an SVG path, so that a page draws it without inserting foreign markup. */
export function qrPicture(text: string): QrPicture {
	const { modules } = create(text, { errorCorrectionLevel: 'M' });
	const dark: string[] = [];
	for (let y = 0; y < modules.size; y++) {
		for (let x = 0; x < modules.size; x++) {
			if (modules.get(y, x)) dark.push(`M${x + QUIET} ${y + QUIET}h1v1h-1z`);
		}
	}
	return { size: modules.size + 2 * QUIET, path: dark.join('') };
}
