import * as tus from "tus-js-client";
import { begunUpload, uploadAnswer, type UploadAnswer, type UploadPurpose } from "@/lib/contracts/uploads";
import { expect, vi } from "vitest";
import { baseUrl, type Session } from "./session";

export interface Begun {
  uploadId: string;
  address: string;
}

/** Announces a file and gives the answer as it is. */
export function announce(
  who: Session,
  file: { purpose: UploadPurpose; subjectId: string; name?: string; bytes: number },
): Promise<Response> {
  return who.send("POST", "/api/v1/uploads", { name: "a file", ...file });
}

/** Announces a file that may come. */
export async function begin(
  who: Session,
  file: { purpose: UploadPurpose; subjectId: string; name?: string; bytes: number },
): Promise<Begun> {
  const answer = await announce(who, file);
  expect(answer.status, await answer.clone().text()).toBe(201);
  return begunUpload.parse(await answer.json());
}

/**
 * Sends bytes by the client of the open protocol (tus-js-client, not ours). With `breakAfter` it breaks off after so many
 * bytes, in the middle of a piece, and resolves to what the server had acknowledged by then.
 */
export function sendByTus(
  who: Session,
  {
    address,
    bytes,
    breakAfter,
    chunkSize = 1_000_000,
  }: {
    address: string;
    bytes: Uint8Array;
    breakAfter?: number;
    chunkSize?: number;
  },
): Promise<number> {
  return new Promise((resolve, reject) => {
    let acknowledged = 0;
    const upload = new tus.Upload(Buffer.from(bytes), {
      uploadUrl: `${baseUrl()}${address}`,
      chunkSize,
      retryDelays: [],
      headers: { cookie: who.cookie(), origin: baseUrl() },
      storeFingerprintForResuming: false,
      onProgress(sent) {
        if (breakAfter !== undefined && sent >= breakAfter) void upload.abort().then(() => resolve(acknowledged));
      },
      onChunkComplete: (_size, accepted) => void (acknowledged = accepted),
      onError: reject,
      onSuccess: () => resolve(acknowledged),
    });
    upload.start();
  });
}

/** One piece as the protocol has it. */
export function patch(who: Session, address: string, offset: number, bytes: Uint8Array): Promise<Response> {
  return who.fetch(address, {
    method: "PATCH",
    headers: {
      "tus-resumable": "1.0.0",
      "upload-offset": String(offset),
      "content-type": "application/offset+octet-stream",
    },
    body: Buffer.from(bytes),
  });
}

/** Where an upload stands by the protocol. */
export function ask(who: Session, address: string): Promise<Response> {
  return who.fetch(address, { method: "HEAD", headers: { "tus-resumable": "1.0.0" } });
}

/** What became of an upload once the worker is through with it. */
export function outcome(who: Session, uploadId: string): Promise<UploadAnswer> {
  return vi.waitFor(
    async () => {
      const answer = uploadAnswer.parse(await (await who.fetch(`/api/v1/uploads/${uploadId}`)).json());
      if (answer.state === "sending" || answer.state === "received") throw new Error("Not read yet.");
      return answer;
    },
    { timeout: 60_000, interval: 200 },
  );
}
