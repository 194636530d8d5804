/** Modes that one request can have. */
export const MODE_LIMIT = 20_000;

/** Numbers that the modes of one request may hold at once (shapes, or two ends of each segment), 64 MB. */
export const HELD_NUMBERS = 8_000_000;
