const HEARTBEAT_SECONDS = 15;
const WIDTH = 46;

/**
 * Runs one phase and shows that it is running: on a terminal a line that counts the seconds, elsewhere a line at the
 * start, one every fifteen seconds and one at the end.
 * @template T
 * @param {string} title
 * @param {(note: (text: string) => void) => Promise<T>} work `note` puts a few words behind the finished line.
 * @returns {Promise<T>}
 */
export async function phase(title, work) {
	const began = performance.now();
	const seconds = () => (performance.now() - began) / 1000;
	const terminal = process.stdout.isTTY;
	let remark = '';
	const line = (/** @type {string} */ sign) =>
		`  ${sign} ${title.padEnd(WIDTH)} ${seconds().toFixed(1).padStart(6)} s${remark && `  ${remark}`}`;
	if (terminal) process.stdout.write(line('…'));
	const timer = terminal
		? setInterval(() => process.stdout.write(`\r\x1b[2K${line('…')}`), 500)
		: setInterval(
				() => console.log(`    still at it: ${title}, ${Math.round(seconds())} s`),
				HEARTBEAT_SECONDS * 1000
			);
	const finish = (/** @type {string} */ sign) => {
		clearInterval(timer);
		if (terminal) process.stdout.write('\r\x1b[2K');
		console.log(line(sign));
	};
	try {
		const result = await work((text) => {
			remark = text;
		});
		finish('✓');
		return result;
	} catch (error) {
		finish('✗');
		throw error;
	}
}
