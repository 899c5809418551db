import "server-only";
import { run, type TaskList } from "graphile-worker";
import { closePools } from "@/db/client";
import { databaseUrls } from "@/db/urls";
import { env } from "@/lib/env";
import { logFault } from "./log";
import { noteMailFailure, processFileTask, sendMailTask } from "./tasks";

const tasks: TaskList = {
  async send_mail(payload, helpers) {
    const job = payload as { shopId: string; mailId: string };
    try {
      await sendMailTask(job, `job-${helpers.job.id}`);
    } catch (error) {
      await noteMailFailure(job, error instanceof Error ? error.message : String(error), `job-${helpers.job.id}`).catch(
        () => undefined,
      );
      throw error;
    }
  },
  async process_file(payload, helpers) {
    await processFileTask(payload as { shopId: string; fileId: string }, `job-${helpers.job.id}`);
  },
};

async function main(): Promise<void> {
  env();
  const runner = await run({
    connectionString: databaseUrls().owner,
    concurrency: 3,
    noHandleSignals: true,
    pollInterval: 1000,
    taskList: tasks,
  });
  runner.events.on("job:error", ({ job, error }) => logFault(`job-${job.id}`, job.task_identifier, error));
  const stop = async () => {
    await runner.stop();
    await closePools();
    process.exit(0);
  };
  process.on("SIGTERM", () => void stop());
  process.on("SIGINT", () => void stop());
  console.log("worker ready");
  await runner.promise;
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
