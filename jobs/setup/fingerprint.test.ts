import { mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { fingerprint } from './fingerprint.mjs';

const root = mkdtempSync(join(tmpdir(), 'fadewell-print-'));
afterAll(() => rmSync(root, { recursive: true, force: true }));
const put = (file: string, text: string) => writeFileSync(join(root, file), text);
const print = () => fingerprint(root, ['src', 'vite.config.ts', 'absent.ts'], ['v20']);

beforeEach(() => {
	rmSync(join(root, 'src'), { recursive: true, force: true });
	mkdirSync(join(root, 'src', 'lib', 'paraglide'), { recursive: true });
	put('src/a.ts', 'one');
	put('src/b.ts', 'two');
	put('vite.config.ts', 'config');
});

test('the same files give the same fingerprint, written again or not', () => {
	const before = print();
	put('src/a.ts', 'one');
	expect(print()).toBe(before);
	expect(before).toMatch(/^[0-9a-f]{64}$/);
});

test.each<[string, () => void]>([
	['a content changes', () => put('src/a.ts', 'One')],
	['a file is added', () => put('src/c.ts', '')],
	['a file is renamed', () => renameSync(join(root, 'src/a.ts'), join(root, 'src/z.ts'))],
	['a file goes', () => rmSync(join(root, 'src/b.ts'))],
	['text moves from one file to the next', () => (put('src/a.ts', 'onet'), put('src/b.ts', 'wo'))],
	['the configuration changes', () => put('vite.config.ts', 'other')]
])('another fingerprint when %s', (_, change) => {
	const before = print();
	change();
	expect(print()).not.toBe(before);
});

test('another fingerprint under another version of Node', () => {
	expect(fingerprint(root, ['src'], ['v22'])).not.toBe(fingerprint(root, ['src'], ['v20']));
});

test('generated texts and tests do not count', () => {
	const before = print();
	put('src/lib/paraglide/messages.js', 'generated');
	put('src/a.test.ts', 'a test');
	expect(print()).toBe(before);
});
