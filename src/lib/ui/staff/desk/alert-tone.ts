import { ALERT_URGENCY, type AlertKind } from '../../../domain/followup/alert';
import type { Tone } from '../../status/tone';

/** How an alert looks: what cannot wait is marked as danger, what is due today as late, the rest as waiting. */
export function alertTone(kind: AlertKind): Tone {
	const urgency = ALERT_URGENCY[kind];
	return urgency === 0 ? 'danger' : urgency === 1 ? 'late' : 'waits';
}
