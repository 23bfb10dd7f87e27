/** Most trees one text may hold; a posterior sample of this size is already far beyond what the test gains from. */
export const TREE_LIMIT = 10_000;

/** Most tips one tree may have. */
export const TIP_LIMIT = 10_000;

/**
 * Most nodes one tree may have. Branching alone gives at most 19,999; the rest is room for nodes with a single child, and
 * an end to a text of nothing but opening brackets.
 */
export const NODE_LIMIT = 1_000_000;
