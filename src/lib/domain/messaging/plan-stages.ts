import type { Outcome, Stage } from '../followup/states';

/** After these a message of ours could only hurt or confuse: nothing is planned and all that waits is withdrawn. */
export const SILENT_OUTCOMES: readonly Outcome[] = ['died', 'entered-twice', 'not-reached'];

/** Stages in which the family is asked each morning. */
export const ASKING_STAGES: readonly Stage[] = ['to-book', 'booked', 'confirmed', 'missed'];
