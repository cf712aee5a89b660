import { afterEach, expect, test } from "vitest";
import { sqlExecutor } from "@/db/client/executor";
import { startJobs, type Jobs } from "@/lib/services/jobs/jobs";
import { setUpDatabase } from "@/tests/setup/database";

const database = setUpDatabase();
const open: Jobs[] = [];
const errors: Error[] = [];

async function connectJobs(works: boolean): Promise<Jobs> {
  const jobs = await startJobs({
    databaseUrl: database.urls.app,
    works,
    onError: (error) => errors.push(error),
    pollingSeconds: 0.5,
  });
  open.push(jobs);
  return jobs;
}

async function waiting(): Promise<number> {
  const found: { rows: { n: number }[] } = await database.app.raw(
    "select count(*) as n from jobs.job where state < 'active'",
  );
  return found.rows[0]?.n ?? -1;
}

afterEach(async () => {
  await Promise.all(open.splice(0).map((each) => each.stop(2_000)));
  await database.app.raw("delete from jobs.job");
  expect(errors.splice(0)).toEqual([]);
});

const fileId = "01890a5d-ac96-774b-bcce-b302099a8057";

test("a job sent in a transaction is there when it commits, and only then", async () => {
  const jobs = await connectJobs(false);
  await expect(
    database.app.transaction(async (transaction) => {
      expect(await jobs.send("file-read", { uploadId: fileId }, { within: sqlExecutor(transaction) })).toBeTypeOf(
        "string",
      );
      throw new Error("taken back");
    }),
  ).rejects.toThrow("taken back");
  expect(await waiting()).toBe(0);
  await database.app.transaction(async (transaction) => {
    await jobs.send("file-read", { uploadId: fileId }, { within: sqlExecutor(transaction) });
  });
  expect(await waiting()).toBe(1);
});

test("of two sent with the same key while one waits, the second is not kept; without a key both are", async () => {
  const jobs = await connectJobs(false);
  expect(await jobs.send("search-rebuild", {}, { onceBy: "all" })).toBeTypeOf("string");
  expect(await jobs.send("search-rebuild", {}, { onceBy: "all" })).toBeUndefined();
  expect(await waiting()).toBe(1);
  await jobs.send("file-read", { uploadId: fileId });
  await jobs.send("file-read", { uploadId: fileId });
  expect(await waiting()).toBe(3);
});

test("two workers on one database do each job once", async () => {
  const [one, two] = [await connectJobs(true), await connectJobs(true)];
  const done: string[] = [];
  const ids: (string | undefined)[] = [];
  for (let n = 0; n < 6; n += 1) ids.push(await one.send("file-read", { uploadId: fileId }));
  const finished = new Promise<void>((resolve) => {
    const handler = async (_data: object, jobId: string): Promise<void> => {
      done.push(jobId);
      if (done.length >= ids.length) resolve();
    };
    void one.work("file-read", handler);
    void two.work("file-read", handler);
  });
  await finished;
  expect(done.toSorted()).toEqual(ids.toSorted());
});

test("a job whose data isn't what its queue carries is refused when it is sent", async () => {
  const jobs = await connectJobs(false);
  await expect(jobs.send("file-read", { uploadId: "not an id" })).rejects.toThrow(/uuid/i);
});

test("the application's role works the queues but owns none of their tables", async () => {
  const found: { rows: { owner: string }[] } = await database.app.raw(
    "select distinct tableowner as owner from pg_tables where schemaname = 'jobs'",
  );
  expect(found.rows).toEqual([{ owner: "fanfold_owner" }]);
});
