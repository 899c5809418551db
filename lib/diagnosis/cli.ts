import { createReadStream, readFileSync } from "node:fs";
import { createInterface } from "node:readline";
import { assess } from "./assess";
import { parseCaseFile } from "./case-file";

const USAGE = "usage: assess FILE.json | assess - | assess --ndjson FILE|-";

function parse(text: string) {
  let input: unknown;
  try {
    input = JSON.parse(text.replace(/^\uFEFF/, ""));
  } catch (error) {
    return { ok: false as const, errors: [{ path: "(case)", reason: `not JSON: ${(error as Error).message}` }] };
  }
  return parseCaseFile(input);
}

/** One case: the answer on standard output, or its faults on standard error and exit 2. */
function one(file: string): number {
  let text: string;
  try {
    text = readFileSync(file === "-" ? 0 : file, "utf8");
  } catch (error) {
    process.stderr.write(`${file}: ${(error as Error).message}\n`);
    return 2;
  }
  const parsed = parse(text);
  if (!parsed.ok) {
    for (const { path, reason } of parsed.errors) process.stderr.write(`${path}: ${reason}\n`);
    return 2;
  }
  process.stdout.write(`${JSON.stringify(assess(parsed.caseFile), null, 2)}\n`);
  return 0;
}

/** One case a line, one answer a line, in order; a faulty line answers with its errors and the run goes on. */
async function lines(file: string): Promise<number> {
  let code = 0;
  const input = createInterface({
    input: file === "-" ? process.stdin : createReadStream(file),
    crlfDelay: Number.POSITIVE_INFINITY,
  });
  for await (const line of input) {
    if (line.trim() === "") continue;
    const parsed = parse(line);
    if (!parsed.ok) code = 2;
    const answer = parsed.ok ? assess(parsed.caseFile) : { errors: parsed.errors };
    if (!process.stdout.write(`${JSON.stringify(answer)}\n`))
      await new Promise((resume) => process.stdout.once("drain", resume));
  }
  return code;
}

const args = process.argv.slice(2);
const ndjson = args.includes("--ndjson");
const files = args.filter((a) => a !== "--ndjson");
const [file] = files;
if (files.length !== 1 || file === undefined || (file !== "-" && file.startsWith("--"))) {
  process.stderr.write(`${USAGE}\n`);
  process.exitCode = 2;
} else process.exitCode = ndjson ? await lines(file) : one(file);
