import { defineConfig } from 'drizzle-kit'

/** `npx drizzle-kit generate --name <what>` writes a reviewed migration; it needs no database. */
export default defineConfig({
  dialect: 'postgresql',
  schema: './db/schema/*.ts',
  out: './drizzle',
  casing: 'snake_case',
})
