import { hoursFrom, type Demo } from './context';
import { pediatricianCloses, pediatricianDecides, pediatricianEndsTreatment } from './decisions';
import { at, type DemoNewborn } from './newborns';
import { deskMarks, homeWithPastVisit, parentConfirms, pediatricianMeasures } from './stories';

export async function treated(demo: Demo): Promise<void> {
	for (const [index, family] of ['Sørensen', 'Tadesse'].entries()) {
		const newborn: DemoNewborn = {
			family,
			given: index === 0 ? 'Liv' : 'Abel',
			weeks: 37,
			days: 4,
			values: [at(38, 2.2)],
			dischargeHour: 44,
			carer: `Hanna ${family}`
		};
		const under = await homeWithPastVisit(demo, newborn, 46 + 24 * index);
		await deskMarks(demo, under, { at: hoursFrom(under.visitAt, 0.1), as: 'arrived' });
		await pediatricianMeasures(demo, under, { at: hoursFrom(under.visitAt, 0.2), value: { below: -0.9 } });
		const decidedAt = hoursFrom(under.visitAt, 0.6);
		await pediatricianDecides(demo, under, { at: decidedAt, decision: { then: 'treat' }, reason: '' });
		if (index === 0) continue;
		const stopAt = new Date(Math.min(hoursFrom(decidedAt, 20).getTime(), hoursFrom(demo.now, -2).getTime()));
		if (stopAt <= decidedAt) continue;
		await pediatricianMeasures(demo, under, { at: hoursFrom(stopAt, -0.5), value: { below: 3.4 } });
		await pediatricianDecides(demo, under, {
			at: hoursFrom(stopAt, -0.2),
			decision: { then: 'treat' },
			reason: 'Stopping now; the repeat is planned from the end of treatment.'
		});
		await pediatricianEndsTreatment(demo, under, stopAt);
	}
}

export async function laterAndLiver(demo: Demo): Promise<void> {
	const weeksOld: [DemoNewborn, number, number | null][] = [
		[
			{
				family: 'Mahlangu',
				given: 'Sipho',
				weeks: 39,
				values: [at(40, 3.2)],
				dischargeHour: 46,
				carer: 'Nomsa Mahlangu'
			},
			10 * 24,
			null
		],
		[
			{
				family: 'Duarte',
				given: 'Inês',
				weeks: 38,
				days: 1,
				feeding: 'formula',
				values: [at(40, 3.0)],
				dischargeHour: 46,
				carer: 'Rita Duarte',
				language: 'es'
			},
			14 * 24,
			null
		],
		[
			{
				family: 'Vesely',
				given: 'Matěj',
				weeks: 39,
				days: 2,
				feeding: 'formula',
				values: [at(40, 3.1)],
				dischargeHour: 46,
				carer: 'Jana Vesely'
			},
			13 * 24,
			2.4
		]
	];
	for (const [newborn, hoursAgo, direct] of weeksOld) {
		const under = await homeWithPastVisit(demo, newborn, hoursAgo);
		await deskMarks(demo, under, { at: hoursFrom(under.visitAt, 0.1), as: 'arrived' });
		await pediatricianMeasures(demo, under, { at: hoursFrom(under.visitAt, 0.2), value: { below: 8.5 } });
		const askAt = hoursFrom(under.bornAt, 14 * 24);
		const decision = {
			then: 'check-later',
			at: askAt,
			asks: 'Still yellow? Colour of stools and urine?'
		} as const;
		await pediatricianDecides(demo, under, { at: hoursFrom(under.visitAt, 0.8), decision });
		if (direct !== null)
			await pediatricianMeasures(demo, under, { at: hoursFrom(demo.now, -3), value: { below: 12, direct } });
	}
}

export async function closed(demo: Demo): Promise<void> {
	const done: [string, string, 'jaundice-settled' | 'care-transferred' | 'moved-away', string][] = [
		['Amsel', 'Jonas', 'jaundice-settled', 'Well below the line and falling, feeding well, weight rising.'],
		['Rahman', 'Nadia', 'jaundice-settled', 'Second value falling, no further test asked for.'],
		['Popescu', 'Ilie', 'jaundice-settled', 'No visible jaundice, birth weight regained.'],
		['Castro', 'Luz', 'care-transferred', 'Family doctor takes over; summary sent.'],
		['Nguyen', 'Bảo', 'moved-away', 'Family moved; the new clinic has the summary.']
	];
	for (const [index, [family, given, outcome, why]] of done.entries()) {
		const newborn: DemoNewborn = {
			family,
			given,
			weeks: 38 + (index % 3),
			values: [at(38, 3.2)],
			dischargeHour: 44,
			carer: `Parent ${family}`,
			clinic: index % 2 === 0 ? 0 : 1
		};
		const under = await homeWithPastVisit(demo, newborn, 60 + 30 * index);
		await parentConfirms(demo, under, hoursFrom(under.visitAt, -4));
		await deskMarks(demo, under, { at: hoursFrom(under.visitAt, 0.1), as: 'arrived' });
		await pediatricianMeasures(demo, under, { at: hoursFrom(under.visitAt, 0.2), value: { below: 7.8 } });
		await pediatricianCloses(demo, under, { at: hoursFrom(under.visitAt, 0.9), outcome, why });
	}
}
