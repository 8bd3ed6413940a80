import { z } from 'zod';

// Without this zod compiles parsers by `new Function`, which the content-security policy forbids. Schemas
// decide when they are made, so this module is imported before any that makes one.
z.config({ jitless: true });
