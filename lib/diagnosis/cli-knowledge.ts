import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { trimTableSource } from "./cli-knowledge-source";

writeFileSync(fileURLToPath(new URL("./tables/trims.ts", import.meta.url)), trimTableSource());
