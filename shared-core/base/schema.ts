import { z } from 'zod';

// The content security policy forbids code made from text; without this zod would try it, and report a violation.
z.config({ jitless: true });

export { z };
