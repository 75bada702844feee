import { raiseAlert } from '../src/lib/server/services/alerts';
import { renderForSending } from '../src/lib/server/services/message-content';
import { runWorker } from './run-worker';
import { serviceTicks } from './service-ticks';

/** One worker: sends what is due and keeps the clockwork. Any number may run over one database. */
await runWorker({ render: renderForSending, raiseAlert, ticks: serviceTicks });
