/** Parents' pages are plain HTML: nothing to download, nothing to break on an old telephone. */
export const csr = false;
