import type { Icon } from '../icon';

export interface MenuItem {
	readonly label: string;
	readonly icon?: Icon;
	/** A link, or something to do; one of the two. */
	readonly href?: string;
	readonly onSelect?: () => void;
	readonly danger?: boolean;
	readonly disabled?: boolean;
}
