export { assessAtAnyAge } from './any-age';
export { assess } from './assess';
export { ageHours, dayOfAge, formatGestationalAge, parseGestationalAge, shownHours } from './age';
export { albuminRatioLimit, albuminRatioReached } from './aap-2022-cautions';
export { PLAUSIBLE, type CheckOptions } from './check';
export { expectedDiapers, triageCheckIn } from './check-in';
export {
	publishedRange,
	thresholdCurve,
	thresholdsAt,
	type CurveRequest,
	type PublishedRange
} from './curve';
export {
	EMERGENCY_SIGN_IDS,
	EMERGENCY_SIGNS,
	emergencySignsSay,
	type EmergencySign,
	type EmergencySignId
} from './emergency-signs';
export { describeResult } from './explain';
export { HOME_LIMITS } from './home-limits';
export {
	neurotoxicityRisksSay,
	placeOf,
	placeOfDeciding,
	resultSays,
	type Place,
	type ReachedLine
} from './meaning';
export {
	directFraction,
	nextProlongedJaundiceCheckAt,
	prolongedJaundiceChecks,
	type ProlongedJaundiceCheck
} from './prolonged';
export { phototherapyStopLevel, reboundScore, type ReboundScore } from './rebound';
export { STANDARDS, type StandardSummary } from './registry';
export { rateOfRise } from './pair';
export { JAUNDICE_RISK_DEFINITIONS, NEUROTOXICITY_RISK_DEFINITIONS, type RiskDefinition } from './risks';
export { encephalopathyScore, type EncephalopathyScore, type EncephalopathySigns } from './signs';
export { convert, formatBilirubin } from './units';
export * from './types';
