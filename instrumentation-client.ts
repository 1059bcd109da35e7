/** Next runs this in the browser before anything else of the program. */

// zod would try whether it may compile schemas by eval; the content policy refuses that and reports it. This is what zod's
// config({ jitless: true }) sets, but to import that brings 4 kB of zod to pages that need none of it.
Object.assign(globalThis, { __zod_globalConfig: { jitless: true } });
