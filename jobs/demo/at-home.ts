import { hoursFrom, type Demo } from './context';
import { at, type DemoNewborn } from './newborns';
import { homeWithVisit, parentAsksOtherTime, parentChecksIn, parentConfirms } from './stories';

export async function bookedAndConfirmed(demo: Demo): Promise<void> {
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

export async function checkedIn(demo: Demo): Promise<void> {
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

export async function twins(demo: Demo): Promise<void> {
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
