import { createTemplate } from "@/lib/local/test-database";

export default async function setup(): Promise<void> {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) throw new Error("TEST_DATABASE_URL is not set: run `npm test -- integration`, which brings a database.");
  await createTemplate(url);
}
