import { randomBytes } from "node:crypto";
import { chmod, mkdir, readFile, writeFile } from "node:fs/promises";
import { join } from "node:path";

const fresh = () => ({
  superuserPassword: randomBytes(24).toString("hex"),
  ownerPassword: randomBytes(24).toString("hex"),
  appPassword: randomBytes(24).toString("hex"),
  authPassword: randomBytes(24).toString("hex"),
  authSecret: randomBytes(32).toString("base64url"),
  filesKey: `sk_live_${randomBytes(24).toString("hex")}`,
});

/**
 * Passwords and keys made on the first start and kept for the next ones, readable by their owner only.
 *
 * @param {string} folder where secrets.json lies
 * @returns {Promise<ReturnType<typeof fresh> & { isNew: boolean }>} `isNew` when there was no usable file
 */
export async function secretsIn(folder) {
  const path = join(folder, "secrets.json");
  await mkdir(folder, { recursive: true });
  const kept = await readFile(path, "utf8")
    .then(JSON.parse)
    .catch(() => ({}));
  const all = { ...fresh(), ...kept };
  const isNew = Object.keys(fresh()).some((name) => !(name in kept));
  if (isNew) await writeFile(path, `${JSON.stringify(all, null, 2)}\n`, { mode: 0o600 });
  await chmod(path, 0o600);
  return { ...all, isNew };
}
