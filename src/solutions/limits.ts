/** Modes that one request can have. */
export const MODE_LIMIT = 20_000;

/** Numbers that the modes of one request may hold at once (shapes, or two ends of each segment), 64 MB. */
export const HELD_NUMBERS = 8_000_000;

/** Values of a field, of mode shapes or of transfer functions in one answer. */
export const ANSWER_VALUES = 1_000_000;

/** Frequencies of one transfer function, refined ones among them (schemas/Frequencies.json says the same). */
export const FREQUENCY_LIMIT = 100_000;
