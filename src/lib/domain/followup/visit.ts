export const VISIT_KINDS = ['check', 'blood-draw', 'feeding-help'] as const;
export type VisitKind = (typeof VISIT_KINDS)[number];

export const VISIT_STATES = ['booked', 'confirmed', 'arrived', 'missed', 'cancelled', 'moved'] as const;
export type VisitState = (typeof VISIT_STATES)[number];
