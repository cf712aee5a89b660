import { createHash, createHmac, timingSafeEqual } from "node:crypto";

/** The parts of a request that its signature covers. Header names in lower case. */
export interface SignedRequest {
  method: string;
  /** Path and query as they were sent. */
  target: string;
  headers: Record<string, string>;
}

const sha256 = (text: string): string => createHash("sha256").update(text).digest("hex");
const hmac = (key: string | Buffer, text: string): Buffer => createHmac("sha256", key).update(text).digest();

/**
 * The signature that a request must carry: AWS Signature Version 4 with the Authorization header, as Amazon's S3
 * reference publishes it ("Authenticating Requests: Using the Authorization Header").
 */
export function expectedSignature(
  request: SignedRequest,
  secret: string,
  scope: string,
  signedHeaders: string[],
): string {
  const [path = "/", query = ""] = request.target.split("?");
  const canonical = [
    request.method,
    path,
    query
      .split("&")
      .filter((part) => part !== "")
      .map((part) => (part.includes("=") ? part : `${part}=`))
      .sort()
      .join("&"),
    ...signedHeaders.map((name) => `${name}:${(request.headers[name] ?? "").trim().replace(/ +/g, " ")}`),
    "",
    signedHeaders.join(";"),
    request.headers["x-amz-content-sha256"] ?? "",
  ].join("\n");
  const toSign = ["AWS4-HMAC-SHA256", request.headers["x-amz-date"] ?? "", scope, sha256(canonical)].join("\n");
  const [date = "", region = "", service = "", terminator = ""] = scope.split("/");
  const key = [region, service, terminator].reduce<Buffer>((so, part) => hmac(so, part), hmac(`AWS4${secret}`, date));
  return hmac(key, toSign).toString("hex");
}

/** Whether the request was signed with that key; a request that is not signed at all is refused. */
export function isSigned(request: SignedRequest, accessKey: string, secret: string): boolean {
  const found =
    /^AWS4-HMAC-SHA256 Credential=([^/]+)\/([^,]+), ?SignedHeaders=([^,]+), ?Signature=([0-9a-f]{64})$/.exec(
      request.headers.authorization ?? "",
    );
  if (!found || found[1] !== accessKey) return false;
  const signedHeaders = (found[3] ?? "").split(";");
  if (!signedHeaders.includes("host") || !signedHeaders.includes("x-amz-content-sha256")) return false;
  const expected = expectedSignature(request, secret, found[2] ?? "", signedHeaders);
  return timingSafeEqual(Buffer.from(expected), Buffer.from(found[4] ?? ""));
}
