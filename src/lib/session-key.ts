/** Where the session view stands in the query cache. */
export const SESSION_KEY = ['session'] as const;
