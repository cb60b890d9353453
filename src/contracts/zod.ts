import { z } from 'zod';

// In a browser zod would try `new Function` once, which our content policy refuses and reports.
if (typeof document !== 'undefined') z.config({ jitless: true });

export { z };
