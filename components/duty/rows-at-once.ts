/** Rows of nights that the server draws: more than a screen of 1440 px shows at once. */
export const AT_ONCE = 42;
