import type { Language } from '../../domain/messaging/language';
import type { DefaultWording } from './default-wording';
import { ar } from './defaults/ar';
import { en } from './defaults/en';
import { es } from './defaults/es';
import { vi } from './defaults/vi';
import { zh } from './defaults/zh';

/** The wording that ships with the product, by language. */
export const DEFAULT_WORDING: Readonly<Record<Language, DefaultWording>> = { en, es, vi, zh, ar };
