import { hoursFrom, type Demo } from './context';
import { pediatricianCloses, pediatricianDecides, pediatricianEndsTreatment } from './decisions';
import type { DemoNewborn } from './newborns';
import {
	deskCalls,
	deskMarks,
	enter,
	homeWithPastVisit,
	homeWithVisit,
	leave,
	parentAsksOtherTime,
	parentChecksIn,
	parentConfirms,
	pediatricianMeasures
} from './stories';

/** A value two days after birth, well or less well below the line. */
const at = (hour: number, below: number) => ({ hour, below });

async function waitingInTheUnit(demo: Demo): Promise<void> {
	const today = (hours: number) => hoursFrom(demo.now, hours);
	await enter(
		demo,
		{
			family: 'Abara',
			given: 'Chidi',
			weeks: 39,
			days: 2,
			values: [],
			dischargeHour: 30,
			carer: 'Ngozi Abara'
		},
		today(3)
	);
	await enter(
		demo,
		{
			family: 'Kowalczyk',
			given: 'Maja',
			weeks: 37,
			days: 5,
			values: [{ hour: 30, below: 1.4, method: 'transcutaneous' }],
			dischargeHour: 38,
			carer: 'Ewa Kowalczyk'
		},
		today(4)
	);
	await enter(
		demo,
		{
			family: 'Ferreira da Conceição e Albuquerque',
			given: 'Maria Antónia',
			weeks: 38,
			values: [at(20, 1.2)],
			dischargeHour: 30,
			carer: 'Beatriz Ferreira da Conceição e Albuquerque',
			language: 'es'
		},
		today(6)
	);
	await enter(
		demo,
		{
			family: 'Nakamura',
			given: 'Hana',
			weeks: 36,
			days: 3,
			values: [at(40, -0.6)],
			dischargeHour: 48,
			carer: 'Yui Nakamura',
			risks: ['isoimmune-hemolysis']
		},
		today(5)
	);
	await enter(
		demo,
		{
			family: "O'Sullivan-Byrne",
			given: 'Cathal',
			weeks: 40,
			days: 1,
			values: [at(28, 4.1)],
			dischargeHour: 36,
			carer: "Aoife O'Sullivan-Byrne",
			secondCarer: 'Niall Byrne'
		},
		today(1)
	);
	await enter(
		demo,
		{
			family: 'Haddad',
			given: 'ليلى',
			weeks: 38,
			days: 6,
			values: [at(32, 2.6)],
			dischargeHour: 40,
			carer: 'سارة حداد',
			language: 'ar',
			feeding: 'mixed'
		},
		today(2)
	);
	await enter(
		demo,
		{
			family: 'Lund',
			given: 'Elin',
			weeks: 39,
			values: [at(34, 8.2)],
			dischargeHour: 40,
			carer: 'Karin Lund'
		},
		today(2.5)
	);
}

async function goneHomeWithoutVisit(demo: Demo): Promise<void> {
	const gone: [DemoNewborn, number][] = [
		[
			{
				family: 'Mbeki',
				given: 'Thandi',
				weeks: 38,
				days: 1,
				values: [at(40, 4.4)],
				dischargeHour: 46,
				carer: 'Lindiwe Mbeki'
			},
			1
		],
		[
			{
				family: 'Petrov',
				given: 'Mila',
				weeks: 37,
				days: 2,
				values: [at(30, 3.0)],
				dischargeHour: 36,
				carer: 'Oksana Petrov'
			},
			7
		],
		[
			{
				family: 'Quispe',
				given: 'Inti',
				weeks: 39,
				days: 4,
				values: [at(44, 5.0)],
				dischargeHour: 50,
				carer: 'Rosa Quispe',
				language: 'es',
				clinic: 1
			},
			2
		]
	];
	for (const [newborn, hoursAgo] of gone) {
		const under = await enter(demo, newborn, hoursFrom(demo.now, -hoursAgo));
		await leave(demo, under, null);
	}
}

async function bookedAndConfirmed(demo: Demo): Promise<void> {
	const ahead: [DemoNewborn, number, 'waits' | 'confirms' | 'asks'][] = [
		[
			{
				family: 'Ramírez',
				given: 'Mateo',
				weeks: 39,
				days: 1,
				values: [at(36, 4.2)],
				dischargeHour: 42,
				carer: 'Lucía Ramírez',
				language: 'es'
			},
			3,
			'waits'
		],
		[
			{
				family: 'Tran',
				given: 'An',
				weeks: 38,
				days: 2,
				values: [at(30, 6.0)],
				dischargeHour: 38,
				carer: 'Trần Thị Mai',
				language: 'vi'
			},
			8,
			'waits'
		],
		[
			{
				family: 'Osei',
				given: 'Kofi',
				weeks: 40,
				values: [at(48, 7.6)],
				dischargeHour: 54,
				carer: 'Abena Osei',
				secondCarer: 'Kwame Osei'
			},
			16,
			'waits'
		],
		[
			{
				family: 'Chen',
				given: '安琪',
				weeks: 37,
				days: 6,
				values: [at(34, 3.8)],
				dischargeHour: 44,
				carer: '陈美玲',
				language: 'zh'
			},
			6,
			'confirms'
		],
		[
			{
				family: 'Bergström',
				given: 'Alva',
				weeks: 39,
				days: 3,
				values: [at(40, 5.8)],
				dischargeHour: 46,
				carer: 'Sofia Bergström'
			},
			10,
			'confirms'
		],
		[
			{
				family: 'Rossi',
				given: 'Giulia',
				weeks: 38,
				days: 4,
				values: [at(38, 4.9)],
				dischargeHour: 44,
				carer: 'Chiara Rossi',
				clinic: 1
			},
			12,
			'confirms'
		],
		[
			{
				family: 'Kaya',
				given: 'Deniz',
				weeks: 36,
				days: 6,
				values: [at(36, 2.8)],
				dischargeHour: 44,
				carer: 'Elif Kaya'
			},
			2,
			'confirms'
		],
		[
			{
				family: 'Novak',
				given: 'Tea',
				weeks: 39,
				values: [at(42, 5.2)],
				dischargeHour: 48,
				carer: 'Petra Novak'
			},
			5,
			'asks'
		],
		[
			{
				family: 'Iyer',
				given: 'Asha',
				weeks: 38,
				days: 5,
				values: [at(30, 4.5)],
				dischargeHour: 40,
				carer: 'Divya Iyer',
				clinic: 1
			},
			4,
			'waits'
		],
		[
			{
				family: 'Farouk',
				given: 'Yusuf',
				weeks: 37,
				days: 4,
				values: [at(44, 3.7)],
				dischargeHour: 50,
				carer: 'Mona Farouk',
				consentsToSms: false
			},
			5,
			'waits'
		]
	];
	for (const [newborn, hoursAgo, then] of ahead) {
		const under = await homeWithVisit(demo, newborn, hoursAgo);
		const soon = hoursFrom(demo.now, -hoursAgo / 2);
		try {
			if (then === 'confirms') await parentConfirms(demo, under, soon);
			if (then === 'asks')
				await parentAsksOtherTime(demo, under, {
					at: soon,
					wish: 'After 3 pm, when my sister can drive us.'
				});
		} catch (error) {
			if (!(error instanceof Error && error.message.includes('conflict'))) throw error;
		}
	}
}

async function checkedIn(demo: Demo): Promise<void> {
	const answered: [DemoNewborn, Parameters<typeof parentChecksIn>[2]['answers']][] = [
		[
			{
				family: 'Delacroix',
				given: 'Noé',
				weeks: 38,
				days: 3,
				values: [at(36, 5.6)],
				dischargeHour: 42,
				carer: 'Camille Delacroix'
			},
			{ waking: 'cannot-be-woken', tone: 'limp' }
		],
		[
			{
				family: 'Wójcik',
				given: 'Antek',
				weeks: 37,
				days: 1,
				values: [at(40, 4.0)],
				dischargeHour: 46,
				carer: 'Zofia Wójcik'
			},
			{ yellowArea: 'arms-or-legs', yellowChange: 'more', worried: true }
		],
		[
			{
				family: 'Silva',
				given: 'Davi',
				weeks: 39,
				days: 5,
				values: [at(44, 6.2)],
				dischargeHour: 50,
				carer: 'Ana Silva',
				language: 'es'
			},
			{ wetIn24Hours: 1, feedsIn24Hours: 5 }
		],
		[
			{
				family: 'Park',
				given: 'Ji-woo',
				weeks: 40,
				days: 3,
				values: [at(46, 7.9)],
				dischargeHour: 52,
				carer: 'Min-seo Park'
			},
			{}
		],
		[
			{
				family: 'Okafor',
				given: 'Ada',
				weeks: 39,
				values: [at(38, 5.9)],
				dischargeHour: 44,
				carer: 'Ifeoma Okafor',
				clinic: 1
			},
			{ stoolColour: 'pale-or-white' }
		]
	];
	for (const [index, [newborn, answers]] of answered.entries()) {
		const under = await homeWithVisit(demo, newborn, 14 + index);
		await parentChecksIn(demo, under, { at: hoursFrom(demo.now, -0.4 * (index + 1)), answers });
	}
}

async function didNotCome(demo: Demo): Promise<void> {
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

async function cameToTheClinic(demo: Demo): Promise<void> {
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

async function treated(demo: Demo): Promise<void> {
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

async function laterAndLiver(demo: Demo): Promise<void> {
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

async function closed(demo: Demo): Promise<void> {
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

async function twins(demo: Demo): Promise<void> {
	for (const given of ['Amara', 'Zuri']) {
		const twin: DemoNewborn = {
			family: 'Kimani',
			given,
			weeks: 36,
			days: 5,
			values: [at(40, 2.9)],
			dischargeHour: 48,
			carer: 'Wanjiru Kimani',
			secondCarer: 'Peter Kimani',
			telephone: 75
		};
		await homeWithVisit(demo, twin, 3);
	}
}

/** About forty newborns in every stage and with every kind of trouble, told by the product's own use cases. */
export async function tellScenario(demo: Demo): Promise<void> {
	await closed(demo);
	await laterAndLiver(demo);
	await treated(demo);
	await didNotCome(demo);
	await cameToTheClinic(demo);
	await checkedIn(demo);
	await bookedAndConfirmed(demo);
	await twins(demo);
	await goneHomeWithoutVisit(demo);
	await waitingInTheUnit(demo);
}
