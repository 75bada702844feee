const KIBIBYTE = 1024;

/** What a form or a call-back may weigh; ours are far lighter. */
const USUAL_LIMIT_BYTES = 512 * KIBIBYTE;

/**
 * Routes that take more. The server itself must let as much through: `BODY_SIZE_LIMIT` in `.env.example`.
 * A thousand records with ten measurements each weigh some 1.5 MB.
 */
const LIMIT_BYTES: Readonly<Record<string, number>> = {
	'/api/v1/assessments': 4 * KIBIBYTE * KIBIBYTE
};

/** Whether a request says that its body is longer than its route takes. */
export function isTooLong(request: Request, routeId: string): boolean {
	const bytes = Number(request.headers.get('content-length') ?? 0);
	return bytes > (LIMIT_BYTES[routeId] ?? USUAL_LIMIT_BYTES);
}
