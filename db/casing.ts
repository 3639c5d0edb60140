/** One casing for drizzle, drizzle-kit and the tests: camelCase in code, snake_case in the file. */
export const DB_CASING = 'snake_case' as const;
