/** Next runs this in the browser before anything else of the program. */
import { config } from 'zod/v4/core';

// zod would try whether it may compile schemas by eval; the content policy refuses that and reports it
config({ jitless: true });
