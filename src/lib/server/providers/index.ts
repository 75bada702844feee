import type { Config } from '../config';
import type { MailPort } from './mail/port';
import { openSmtp } from './mail/nodemailer';
import type { SmsPort } from './sms/port';
import { openTwilio } from './sms/twilio';

/** What passes between the product and a family's telephone or mailbox. */
export interface Providers {
	readonly sms: SmsPort;
	readonly mail: MailPort;
}

export interface ProviderLimits {
	readonly timeoutMilliseconds: number;
	/** Calls to one provider at a time, from this process. */
	readonly connections: number;
	readonly mailSentListUrl?: string | undefined;
}

/** Opens both providers as the settings say: the hosted services, or the local fakes. */
export function openProviders(config: Config, limits: ProviderLimits): Providers {
	const { timeoutMilliseconds, connections, mailSentListUrl } = limits;
	return {
		sms: openTwilio({ ...config.sms, timeoutMilliseconds, connections }),
		mail: openSmtp({ ...config.mail, timeoutMilliseconds, connections, sentListUrl: mailSentListUrl })
	};
}
