/** The queue's columns, by the width of the list itself: stacked, two lines of three beside the call panel, one line. */
export const QUEUE_COLUMNS =
	'@2xl:grid-cols-[minmax(0,1.1fr)_minmax(0,1.2fr)_minmax(0,1fr)] ' +
	'@6xl:grid-cols-[minmax(0,11rem)_minmax(0,15.5rem)_minmax(0,10rem)_minmax(0,1fr)_minmax(0,8.5rem)_minmax(0,12rem)]';
