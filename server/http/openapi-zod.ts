import { extendZodWithOpenApi } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';

// Must run before any schema is made, so every schema module takes `z` from here.
extendZodWithOpenApi(z);

export { z };
