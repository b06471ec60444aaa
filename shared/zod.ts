import { z } from 'zod';

// A strict content security policy forbids the compiled parsers that zod would otherwise probe for.
z.config({ jitless: true });

export { z };
