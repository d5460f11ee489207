import { z } from 'zod';

// The pages' content policy forbids code made from text. Asking whether it is allowed is a breach by itself, which the browser
// reports on every page; so in a browser schemas are told not to ask. Imported by each file that other schemas build upon.
if (typeof window !== 'undefined') z.config({ jitless: true });
