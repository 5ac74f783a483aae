import { z } from 'zod';

// zod probes `new Function` to compile parsers; a strict Content-Security-Policy forbids it. Imported before any schema.
z.config({ jitless: true });
