import { z } from 'zod';

// zod would otherwise try `new Function`, which the Content-Security-Policy refuses. Imported first on every page.
z.config({ jitless: true });
