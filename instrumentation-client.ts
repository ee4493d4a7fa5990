// Runs before hydration. zod probes `new Function("")` on the first parse, which a strict content policy reports.
import { config } from 'zod';

config({ jitless: true });
