import { ensurePackages } from "./packages.mjs";
import { report } from "./say.mjs";

try {
  await ensurePackages();
} catch (error) {
  report(error);
  process.exitCode = 1;
}
