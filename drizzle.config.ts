import { defineConfig } from 'drizzle-kit';
import { DB_CASING } from './db/casing';

export default defineConfig({
  dialect: 'sqlite',
  schema: './db/schema/index.ts',
  out: './db/migrations',
  casing: DB_CASING,
});
