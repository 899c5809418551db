import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";

/** The folder that holds package.json. */
export const root = resolve(dirname(fileURLToPath(import.meta.url)), "../..");

/** Everything the drivers keep: the private cluster, secrets, mail, files, logs. Git-ignored; safe to delete. */
export const localDir = join(root, ".local");

export const bin = (name) => join(root, "node_modules/.bin", name);
