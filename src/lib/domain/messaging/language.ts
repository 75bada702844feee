export const LANGUAGES = ['en', 'es', 'vi', 'zh', 'ar'] as const;
export type Language = (typeof LANGUAGES)[number];

export const LANGUAGE_NAMES: Readonly<Record<Language, string>> = {
	en: 'English',
	es: 'Español',
	vi: 'Tiếng Việt',
	zh: '简体中文',
	ar: 'العربية'
};

export const textDirection = (language: Language): 'ltr' | 'rtl' => (language === 'ar' ? 'rtl' : 'ltr');
