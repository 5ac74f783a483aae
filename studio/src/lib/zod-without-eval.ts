import { z } from 'zod';

// zod would otherwise try `new Function`, which the Content-Security-Policy refuses. Imported first by every page that
// reads studies, and bundled with zod itself: whatever makes a schema comes after it.
z.config({ jitless: true });
