/**
 * Version of the recordings' reader as a whole, stored beside every spectrum. It goes up with every change that can
 * change a stored figure.
 */
export const SOUND_READER_VERSION = 1;
