import { raiseAlert } from '../../src/lib/server/services/alerts';
import { renderPlain } from '../bench/plain-messages';
import { runWorker } from '../run-worker';

/** A worker as in production but for what it renders: for measuring it, and for killing it. */
await runWorker({ render: renderPlain, raiseAlert, ticks: () => [] });
