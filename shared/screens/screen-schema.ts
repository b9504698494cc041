import { nameSchema } from '#shared/words/name-schema';

/** What people call a paired display. */
export const screenNameSchema = nameSchema("The screen's name", 60);
