/** A file that cannot be read at all, as opposed to a record that is refused. */
export class UnreadableInput extends Error {}
