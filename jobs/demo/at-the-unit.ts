import { hoursFrom, type Demo } from './context';
import { at, type DemoNewborn } from './newborns';
import { enter, leave } from './stories';

export async function waitingInTheUnit(demo: Demo): Promise<void> {
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

export async function goneHomeWithoutVisit(demo: Demo): Promise<void> {
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
		],
		// Nobody made the visit, and the window is over: the newborn that the product is there to prevent.
		[
			{
				family: 'Karimova',
				given: 'Zilola',
				weeks: 38,
				days: 3,
				values: [at(30, 2.6)],
				dischargeHour: 36,
				carer: 'Dilnoza Karimova',
				language: 'en'
			},
			40
		]
	];
	for (const [newborn, hoursAgo] of gone) {
		const under = await enter(demo, newborn, hoursFrom(demo.now, -hoursAgo));
		await leave(demo, under, null);
	}
}
