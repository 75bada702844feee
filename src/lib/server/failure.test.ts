import { expect, test } from 'vitest';
import { describeFailure } from './failure';

test('a database error keeps its code and statement, not the values it was given', () => {
	const cause = Object.assign(new Error("Duplicate entry 'ana@example.org' for key 'staff_email'"), {
		errno: 1062,
		code: 'ER_DUP_ENTRY'
	});
	const error = Object.assign(
		new Error('Failed query: insert … params: Ana Example,+12025550123', { cause }),
		{
			query: 'insert into `staff` (`name`, `phone`) values (?, ?)',
			params: ['Ana Example', '+12025550123']
		}
	);
	const told = JSON.stringify(describeFailure(error));
	expect(told).toContain('ER_DUP_ENTRY');
	expect(told).toContain('insert into');
	expect(told).not.toMatch(/ana|Ana|2025550123/);
});

test('another error keeps its words, with addresses and numbers masked', () => {
	const told = describeFailure(new TypeError('No carer with (202) 555-0123 or ana@example.org in row 7'));
	expect(told.message).toBe('No carer with ([number] or [address] in row 7');
	expect(told.type).toBe('TypeError');
	expect(told.stack.length).toBeGreaterThan(0);
});

test('what is no error is named by its kind only', () => {
	expect(describeFailure('Ana Example')).toEqual({ type: 'string', stack: [] });
});
