/** A line that tells of one part of the wiring, with its button at the end. */
export const partLine = 'flex flex-wrap items-center justify-between gap-x-4 py-2';
