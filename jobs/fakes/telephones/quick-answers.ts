import type { Language } from '../../../src/lib/domain/messaging/language';
import { WORD_LISTS } from '../../../src/lib/domain/messaging/word-lists';
import type { FakeSms } from '../store';

/** Words that a parent may tap instead of typing, in the language of what the telephone was sent last. */
export function quickAnswers(thread: readonly FakeSms[]): string[] {
	const last = thread.findLast(({ direction }) => direction !== 'inbound');
	const { confirm, otherTime, help, stop, start } = WORD_LISTS[languageOf(last?.body ?? '')];
	return [confirm, otherTime, help, stop, start].flatMap(([first]) =>
		first === undefined ? [] : [first.toUpperCase()]
	);
}

/** A guess by letters, good enough for buttons. */
function languageOf(text: string): Language {
	if (/\p{Script=Arabic}/u.test(text)) return 'ar';
	if (/\p{Script=Han}/u.test(text)) return 'zh';
	if (/[ăđơư\u1ea0-\u1ef9]/iu.test(text)) return 'vi';
	return /[¿¡ñáéíóú]/iu.test(text) ? 'es' : 'en';
}
