import { defineConfig } from 'drizzle-kit';

/** `npm run db:generate -- --name what-it-does` compares the schema with drizzle/ and writes the next migration. */
export default defineConfig({
  dialect: 'postgresql',
  schema: './server/db/schema',
  out: './drizzle',
});
