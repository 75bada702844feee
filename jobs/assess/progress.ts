import { clearLine, cursorTo } from 'node:readline';
import { SingleBar } from 'cli-progress';

export interface Progress {
	readonly advance: (bytes: number, records: number) => void;
	/** Takes the bar off its line, so that something else can be written there; the next advance draws it again. */
	readonly makeRoom: () => void;
	readonly stop: () => void;
}

const SILENT: Progress = { advance: () => {}, makeRoom: () => {}, stop: () => {} };

/** A bar on standard error, only where that is a terminal; without a total it counts records. */
export function startProgress(stream: NodeJS.WriteStream, totalBytes: number | null): Progress {
	if (!stream.isTTY) return SILENT;
	const bar = new SingleBar({
		stream,
		hideCursor: true,
		clearOnComplete: false,
		etaBuffer: 50,
		format:
			totalBytes === null
				? 'Assessed {records} records'
				: 'Assessed {bar} {percentage}%, {records} records, {eta_formatted} left'
	});
	let doneBytes = 0;
	let doneRecords = 0;
	bar.start(totalBytes ?? 0, 0, { records: '0' });
	return {
		advance: (bytes, records) => {
			doneBytes += bytes;
			doneRecords += records;
			bar.update(doneBytes, { records: doneRecords.toLocaleString('en') });
		},
		makeRoom: () => {
			cursorTo(stream, 0);
			clearLine(stream, 0);
		},
		stop: () => bar.stop()
	};
}
