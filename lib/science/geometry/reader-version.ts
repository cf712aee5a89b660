/**
 * Version of the reader as a whole. It goes up with every change that can change a stored figure; readings of every
 * version are kept, and `npm run recompute -- geometry` reads stored files again and tells what changed.
 */
export const READER_VERSION = "4";
