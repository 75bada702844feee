import CalendarCheck from '@lucide/svelte/icons/calendar-check';
import CalendarClock from '@lucide/svelte/icons/calendar-clock';
import CalendarMinus from '@lucide/svelte/icons/calendar-minus';
import CalendarX from '@lucide/svelte/icons/calendar-x';
import UserCheck from '@lucide/svelte/icons/user-check';
import type { VisitState } from '../../../domain/followup/visit';
import type { Icon } from '../../icon';
import type { Tone } from '../../status/tone';

/** How a visit looks by its state: what it asks of the reader, and its own icon. */
export const VISIT_LOOK: Readonly<Record<VisitState, { readonly tone: Tone; readonly icon: Icon }>> = {
	booked: { tone: 'waits', icon: CalendarClock },
	confirmed: { tone: 'calm', icon: CalendarCheck },
	arrived: { tone: 'done', icon: UserCheck },
	missed: { tone: 'late', icon: CalendarX },
	cancelled: { tone: 'done', icon: CalendarMinus },
	moved: { tone: 'done', icon: CalendarMinus }
};
