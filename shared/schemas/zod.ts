/** The one place that configures zod: without compiled validators, so that a strict content policy holds. */
import { z } from 'zod';

z.config({ jitless: true });

export { z };
