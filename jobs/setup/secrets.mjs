import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Explained } from './explained.mjs';

/**
 * @typedef {object} Secrets Made once for each clone; none is ever in the repository.
 * @property {string} cloneId Names this clone where its data must lie outside it.
 * @property {string} databasePassword
 * @property {string} linkSecret Changing it breaks every link that parents hold.
 * @property {string} smsAccount
 * @property {string} smsToken
 */

/** @returns {Secrets} */
export function makeSecrets() {
	return {
		cloneId: randomBytes(6).toString('hex'),
		databasePassword: randomBytes(24).toString('base64url'),
		linkSecret: randomBytes(32).toString('base64url'),
		smsAccount: `AC${randomBytes(16).toString('hex')}`,
		smsToken: randomBytes(16).toString('hex')
	};
}

/**
 * The secrets of the data folder, made on first use and kept in a file that only its owner can read.
 * @param {string} dataDir @returns {Secrets}
 * @throws Explained when the file is there but damaged: new secrets would break parents' links without a word
 */
export function loadSecrets(dataDir) {
	const path = join(dataDir, 'secrets.json');
	if (!existsSync(path)) {
		const secrets = makeSecrets();
		writeFileSync(`${path}.new`, `${JSON.stringify(secrets, null, '\t')}\n`, { mode: 0o600 });
		renameSync(`${path}.new`, path);
		return secrets;
	}
	try {
		const found = JSON.parse(readFileSync(path, 'utf8'));
		const missing = Object.keys(makeSecrets()).filter((name) => typeof found[name] !== 'string');
		if (missing.length === 0) return found;
	} catch {
		// Said below, together with the way out.
	}
	throw new Explained(
		`${path} is damaged. If you have a copy, put it back.\n` +
			`Otherwise delete the file: new secrets are made, and links already sent to parents stop working.`
	);
}
