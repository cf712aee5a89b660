import { createHash } from "node:crypto";
import { createServer, type IncomingMessage, type ServerResponse } from "node:http";
import { buffer } from "node:stream/consumers";
import { isSigned } from "./signature";

export interface TestS3 {
  endpoint: string;
  bucket: string;
  accessKeyId: string;
  secretAccessKey: string;
  close(): Promise<void>;
}

interface Stored {
  body: Buffer;
  modified: Date;
}

/**
 * As much of an S3-compatible store as the product asks of one: one bucket in memory, put, get with range, head, copy and
 * delete, every request's signature and length checked. It is there because no such server can be counted on where the
 * tests run; with S3_ENDPOINT set the same tests run against the real one.
 */
export async function startTestS3(): Promise<TestS3> {
  const account = { bucket: "fanfold-test", accessKeyId: "TESTKEY", secretAccessKey: "test-secret-key" };
  const objects = new Map<string, Stored>();
  const server = createServer((request, response) => {
    respond(request, response, account, objects).catch(() => response.destroy());
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  if (typeof address !== "object" || address === null) throw new Error("The test store has no address.");
  return {
    ...account,
    endpoint: `http://127.0.0.1:${address.port}`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

async function respond(
  request: IncomingMessage,
  response: ServerResponse,
  account: { bucket: string; accessKeyId: string; secretAccessKey: string },
  objects: Map<string, Stored>,
): Promise<void> {
  const method = request.method ?? "";
  const target = request.url ?? "/";
  const headers = Object.fromEntries(Object.entries(request.headers).map(([name, value]) => [name, String(value)]));
  const body = await buffer(request);
  const refuse = (status: number, code: string): void => {
    response.writeHead(status, { "content-type": "application/xml" });
    response.end(method === "HEAD" ? undefined : `<Error><Code>${code}</Code><Message>${code}</Message></Error>`);
  };
  if (!isSigned({ method, target, headers }, account.accessKeyId, account.secretAccessKey)) {
    return refuse(403, "SignatureDoesNotMatch");
  }
  const hash = headers["x-amz-content-sha256"];
  if (hash !== "UNSIGNED-PAYLOAD" && hash !== createHash("sha256").update(body).digest("hex")) {
    return refuse(400, "XAmzContentSHA256Mismatch");
  }
  const [, bucket, ...rest] = decodeURIComponent(target.split("?")[0] ?? "").split("/");
  const key = rest.join("/");
  if (bucket !== account.bucket) return refuse(404, "NoSuchBucket");
  if (key === "") return void response.writeHead(200).end();
  if (method === "PUT") return put(response, refuse, objects, key, body, headers["x-amz-copy-source"]);
  if (method === "DELETE") {
    objects.delete(key);
    return void response.writeHead(204).end();
  }
  const stored = objects.get(key);
  if (!stored) return refuse(404, "NoSuchKey");
  const range = /^bytes=(\d+)-(\d+)$/.exec(headers.range ?? "");
  const part = range ? stored.body.subarray(Number(range[1]), Number(range[2]) + 1) : stored.body;
  response.writeHead(range ? 206 : 200, {
    "content-length": part.byteLength,
    "last-modified": stored.modified.toUTCString(),
    etag: '"test"',
  });
  response.end(method === "HEAD" ? undefined : part);
}

function put(
  response: ServerResponse,
  refuse: (status: number, code: string) => void,
  objects: Map<string, Stored>,
  key: string,
  body: Buffer,
  copySource: string | undefined,
): void {
  if (copySource === undefined) {
    objects.set(key, { body, modified: new Date() });
    return void response.writeHead(200, { etag: '"test"' }).end();
  }
  const source = objects.get(decodeURIComponent(copySource).replace(/^\/?[^/]+\//, ""));
  if (!source) return refuse(404, "NoSuchKey");
  objects.set(key, { body: source.body, modified: new Date() });
  response.writeHead(200, { "content-type": "application/xml" });
  response.end('<CopyObjectResult><ETag>"test"</ETag></CopyObjectResult>');
}
