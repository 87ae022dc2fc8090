import { z } from 'zod';
import { resultSchema } from './resultSchema.ts';

/** JSON Schema of `result.json`; written down by the build, so that the schema library is left out of it. */
const document: object = z.toJSONSchema(resultSchema);
export default document;
