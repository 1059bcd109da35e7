/** When a point comes and goes too often to be believed at once: the rule's figures, for the core and for whoever tells of it. */
export const UNSTEADY = { drops: 3, withinMs: 3_600_000, goodForMs: 600_000 } as const;
