/** A paper as a download that opens in the browser. */
export function pdfResponse({ name, bytes, sha256 }: { name: string; bytes: Uint8Array; sha256: string }): Response {
  return new Response(new Uint8Array(bytes), {
    headers: {
      "content-type": "application/pdf",
      "content-disposition": `inline; filename="${name.replaceAll(/[^\w.-]/g, "-")}"`,
      "cache-control": "private, no-store",
      etag: `"${sha256}"`,
    },
  });
}
