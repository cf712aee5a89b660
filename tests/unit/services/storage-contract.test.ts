import { rmSync } from "node:fs";
import { Readable } from "node:stream";
import { buffer } from "node:stream/consumers";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { env } from "@/lib/env/env";
import { localFolderStorage } from "@/lib/services/storage/local-folder";
import { s3Storage } from "@/lib/services/storage/s3";
import { FileMissingError, type Storage } from "@/lib/services/storage/storage";
import { startTestS3 } from "@/tests/setup/s3/server";
import { temporaryFolder } from "@/tests/setup/temporary-folder";

interface Opened {
  storage: Storage;
  close(): Promise<void>;
}

async function openFolder(): Promise<Opened> {
  const folder = temporaryFolder("storage");
  return { storage: localFolderStorage(folder), close: async () => rmSync(folder, { recursive: true, force: true }) };
}

async function openTestS3(): Promise<Opened> {
  const store = await startTestS3();
  const { accessKeyId, secretAccessKey, bucket, endpoint } = store;
  const credentials = { accessKeyId, secretAccessKey };
  return { storage: s3Storage({ bucket, endpoint, region: "us-east-1", credentials }), close: () => store.close() };
}

async function openGivenS3(): Promise<Opened> {
  const { S3_BUCKET = "", S3_ENDPOINT, S3_REGION, S3_ACCESS_KEY_ID = "", S3_SECRET_ACCESS_KEY = "" } = env();
  const credentials = { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY };
  const storage = s3Storage({ bucket: S3_BUCKET, endpoint: S3_ENDPOINT, region: S3_REGION, credentials });
  return { storage, close: async () => undefined };
}

const given = env().S3_ENDPOINT !== undefined && env().S3_BUCKET !== undefined;

describe.each([
  ["a local folder", openFolder, true],
  ["the S3 protocol, by the tests' own server", openTestS3, true],
  ["the S3 store of S3_ENDPOINT", openGivenS3, given],
])("%s", (_name, open, run) => {
  describe.skipIf(!run)("stores files", () => {
    let opened: Opened;
    beforeAll(async () => {
      opened = await open();
    });
    afterAll(() => opened.close());
    const key = `contract/${process.pid}/a`;
    const text = (storage: Storage, name = key) =>
      storage.get(name).then(async ({ body }) => String(await buffer(body)));

    test("what was put is read back, whole or by range, with its length", async () => {
      const { storage } = opened;
      await storage.ready();
      const bytes = Buffer.from("0123456789");
      await storage.put(key, Readable.from([bytes.subarray(0, 4), bytes.subarray(4)]), 10);
      expect(await text(storage)).toBe("0123456789");
      const part = await storage.get(key, { first: 2, last: 4 });
      expect([String(await buffer(part.body)), part.bytes]).toEqual(["234", 3]);
      const tail = await storage.get(key, { first: 8, last: 999 });
      expect([String(await buffer(tail.body)), tail.bytes]).toEqual(["89", 2]);
      await expect(storage.get(key, { first: 10, last: 12 })).rejects.toThrow(RangeError);
      expect((await storage.head(key))?.bytes).toBe(10);
      await storage.put(key, Buffer.from("anew"), 4);
      expect(await text(storage)).toBe("anew");
    });

    test("a body of another length than announced stores nothing", async () => {
      const { storage } = opened;
      const name = `${key}-short`;
      await expect(storage.put(name, Readable.from([Buffer.from("abc")]), 4)).rejects.toThrow();
      await expect(storage.put(name, Readable.from([Buffer.from("abcde")]), 4)).rejects.toThrow();
      await expect(storage.put(name, Buffer.from("abc"), 4)).rejects.toThrow(RangeError);
      expect(await storage.head(name)).toBeUndefined();
    });

    test("a body that breaks off stores nothing", async () => {
      const { storage } = opened;
      const broken = async function* (): AsyncGenerator<Buffer> {
        yield Buffer.from("ab");
        throw new Error("the line broke");
      };
      await expect(storage.put(`${key}-broken`, Readable.from(broken()), 4)).rejects.toThrow();
      expect(await storage.head(`${key}-broken`)).toBeUndefined();
    });

    test("a copy leaves what is there, and both ends may be deleted twice", async () => {
      const { storage } = opened;
      await storage.put(key, Buffer.from("first"), 5);
      expect(await storage.copyIfAbsent(key, `${key}-copy`)).toBe("copied");
      await storage.put(key, Buffer.from("other"), 5);
      expect(await storage.copyIfAbsent(key, `${key}-copy`)).toBe("present");
      expect(await text(storage, `${key}-copy`)).toBe("first");
      for (const name of [key, key, `${key}-copy`]) await storage.delete(name);
      expect(await storage.head(key)).toBeUndefined();
      await expect(storage.get(key)).rejects.toThrow(FileMissingError);
      await expect(storage.copyIfAbsent(key, "x")).rejects.toThrow(FileMissingError);
    });

    test.each(["../x", "a/../b", "/a", "a//b", "A", ".hidden", "a/", "", "a b", "a\0"])(
      "the key %j is refused everywhere",
      async (bad) => {
        const { storage } = opened;
        await expect(storage.put(bad, Buffer.from("x"), 1)).rejects.toThrow(TypeError);
        await expect(storage.get(bad)).rejects.toThrow(TypeError);
        await expect(storage.head(bad)).rejects.toThrow(TypeError);
        await expect(storage.delete(bad)).rejects.toThrow(TypeError);
      },
    );
  });
});

test("a wrong key is refused by the S3 server and is an error, not an absent file", async () => {
  const store = await startTestS3();
  try {
    const credentials = { accessKeyId: store.accessKeyId, secretAccessKey: "another" };
    const storage = s3Storage({ bucket: store.bucket, endpoint: store.endpoint, region: "us-east-1", credentials });
    await expect(storage.head("a")).rejects.toThrow();
    await expect(storage.ready()).rejects.toThrow();
  } finally {
    await store.close();
  }
});
