import { requestContext } from "@/lib/server/adapter/request-context";
import { requireSameOrigin } from "@/lib/server/adapter/route-response";
import { fileNameFromHeader } from "@/lib/server/uploads/file-name";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { uploadResponse } from "@/lib/server/uploads/upload-response";

export const dynamic = "force-dynamic";

/** Takes one raw file as the body of the request; 201 says that it is safe. Reading it is the next step's. */
export async function POST(request: Request): Promise<Response> {
  return uploadResponse(async () => {
    requireSameOrigin(request);
    const declared = Number(request.headers.get("content-length") ?? Number.NaN);
    const stored = await receiveUpload(await requestContext(), {
      fileName: fileNameFromHeader(request.headers.get("x-file-name")),
      body: request.body,
      declaredBytes: Number.isSafeInteger(declared) && declared >= 0 ? declared : null,
    });
    return Response.json(stored, {
      status: stored.duplicate === null ? 201 : 200,
      headers: { "cache-control": "no-store" },
    });
  });
}
