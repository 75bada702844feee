import { hoursFrom, type Demo } from './context';
import { at, type DemoNewborn } from './newborns';
import { deskCalls, deskMarks, homeWithPastVisit, parentConfirms, pediatricianMeasures } from './stories';

export async function didNotCome(demo: Demo): Promise<void> {
	const family = (name: string, given: string, clinic: 0 | 1 = 0): DemoNewborn => ({
		family: name,
		given,
		weeks: 38,
		days: 2,
		values: [at(36, 3.2)],
		dischargeHour: 42,
		carer: `Parent ${name}`,
		secondCarer: `Second ${name}`,
		clinic
	});
	for (const [index, newborn] of [
		family('Marchetti', 'Leo'),
		family('Achterberg', 'Fenna'),
		family('Boateng', 'Esi', 1)
	].entries()) {
		const under = await homeWithPastVisit(demo, newborn, 7 + 9 * index);
		await deskMarks(demo, under, { at: hoursFrom(under.visitAt, 0.6), as: 'missed' });
		const called = hoursFrom(under.visitAt, 0.9);
		if (index > 0 && called < demo.now)
			await deskCalls(demo, under, {
				at: called,
				outcome: index === 1 ? 'no-answer' : 'left-voicemail',
				note: 'Rang twice.'
			});
	}
}

export async function cameToTheClinic(demo: Demo): Promise<void> {
	const came: [DemoNewborn, number | null][] = [
		[
			{
				family: 'Yılmaz',
				given: 'Ela',
				weeks: 39,
				days: 2,
				values: [at(38, 3.1)],
				dischargeHour: 42,
				carer: 'Zeynep Yılmaz'
			},
			null
		],
		[
			{
				family: 'Moreau',
				given: 'Léa',
				weeks: 38,
				values: [at(40, 3.3)],
				dischargeHour: 46,
				carer: 'Inès Moreau',
				clinic: 1
			},
			null
		],
		[
			{
				family: 'Adeleke',
				given: 'Tobi',
				weeks: 37,
				days: 3,
				values: [at(38, 2.4)],
				dischargeHour: 44,
				carer: 'Funmi Adeleke',
				jaundiceRisks: ['sibling-or-parent-treated']
			},
			-0.8
		],
		[
			{
				family: 'Hernández',
				given: 'Sofía',
				weeks: 38,
				days: 5,
				values: [at(36, 3.0)],
				dischargeHour: 42,
				carer: 'Carmen Hernández',
				language: 'es'
			},
			2.3
		],
		[
			{
				family: 'Lindgren',
				given: 'Nils',
				weeks: 39,
				days: 6,
				values: [at(40, 3.4)],
				dischargeHour: 46,
				carer: 'Maria Lindgren'
			},
			6.1
		]
	];
	for (const [newborn, below] of came) {
		const under = await homeWithPastVisit(demo, newborn, 7);
		await parentConfirms(demo, under, hoursFrom(under.visitAt, -3));
		await deskMarks(demo, under, { at: hoursFrom(under.visitAt, 0.1), as: 'arrived' });
		if (below !== null)
			await pediatricianMeasures(demo, under, { at: hoursFrom(under.visitAt, 0.3), value: { below } });
	}
}
