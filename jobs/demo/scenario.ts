import { closed, laterAndLiver, treated } from './afterwards';
import { bookedAndConfirmed, checkedIn, twins } from './at-home';
import { cameToTheClinic, didNotCome } from './at-the-clinic';
import { goneHomeWithoutVisit, waitingInTheUnit } from './at-the-unit';
import type { Demo } from './context';
import { wroteFromOtherTelephones } from './strays';

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
	await wroteFromOtherTelephones(demo);
}
