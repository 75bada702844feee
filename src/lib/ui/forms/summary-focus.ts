/**
 * Options of a form with an `ErrorSummary`: the summary takes the focus and leads to each field, so the form library must
 * not take it to the first wrong field, which it would do a moment later.
 */
export const SUMMARY_TAKES_FOCUS = { autoFocusOnError: false, scrollToError: 'off' } as const;
