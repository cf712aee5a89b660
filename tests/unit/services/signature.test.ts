import { expect, test } from "vitest";
import { expectedSignature, isSigned } from "@/tests/setup/s3/signature";

const empty = "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855";

test("the test store reckons signatures as Amazon's own worked example does", () => {
  // Amazon S3 API Reference, "Signature Calculations for the Authorization Header", example GET Object;
  // value from memory.
  const signature = expectedSignature(
    {
      method: "GET",
      target: "/test.txt",
      headers: {
        host: "examplebucket.s3.amazonaws.com",
        range: "bytes=0-9",
        "x-amz-content-sha256": empty,
        "x-amz-date": "20130524T000000Z",
      },
    },
    "wJalrXUtnFEMI/K7MDENG/bPxRfiCYEXAMPLEKEY",
    "20130524/us-east-1/s3/aws4_request",
    ["host", "range", "x-amz-content-sha256", "x-amz-date"],
  );
  expect(signature).toBe("f0e8bdb87c964420e857bd35b5d6ed310bd44f0170aba48dd91039c6036bdb41");
});

test("a request without a signature, or with another's, is refused", () => {
  const request = { method: "GET", target: "/", headers: { host: "a", "x-amz-content-sha256": empty } };
  expect(isSigned(request, "KEY", "secret")).toBe(false);
  const authorization =
    "AWS4-HMAC-SHA256 Credential=KEY/20130524/us-east-1/s3/aws4_request, " +
    `SignedHeaders=host;x-amz-content-sha256, Signature=${"0".repeat(64)}`;
  expect(isSigned({ ...request, headers: { ...request.headers, authorization } }, "KEY", "secret")).toBe(false);
});
