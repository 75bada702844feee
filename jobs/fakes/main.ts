import { startFakes } from './fakes';
import { parseFakesSettings } from './settings';

/** The local stand-ins for the SMS and mail services, and the page of the parents' telephones. */
const fakes = await startFakes(parseFakesSettings(process.env));
console.log(
	`SMS service and the parents' telephones on ${fakes.url}, mail service on port ${fakes.smtpPort}`
);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
	process.once(signal, () => {
		fakes.close().then(
			() => process.exit(0),
			() => process.exit(1)
		);
	});
}
