import { collectDefaultMetrics, Gauge, Registry } from 'prom-client';
import type { Ctx } from '../context';
import { getHealth } from './operations';

const registry = new Registry();
collectDefaultMetrics({ register: registry, prefix: 'fadewell_web_' });

const gauge = (name: string, help: string): Gauge =>
	new Gauge({ name: `fadewell_${name}`, help, registers: [registry] });

const workerSilence = gauge(
	'worker_heard_seconds_ago',
	'Seconds since any worker was heard from; -1 where none ever was'
);
const findings = gauge('watch_findings_open', 'What the watch found and has not seen settled');
const due = gauge('messages_due', 'Messages that are due and wait');
const oldest = gauge('messages_oldest_due_seconds', 'How long the oldest due message has waited');
const dead = gauge('messages_given_up', 'Messages that were given up');

export const METRICS_TYPE = registry.contentType;

/** Counts in the text format of Prometheus: read from the database, so that every web process says the same. */
export async function renderMetrics(ctx: Ctx): Promise<string> {
	const health = await getHealth(ctx);
	workerSilence.set(health.workerHeardSecondsAgo ?? -1);
	findings.set(health.openFindings);
	due.set(health.messagesDue);
	oldest.set(health.oldestDueSeconds);
	dead.set(health.messagesDead);
	return registry.metrics();
}
