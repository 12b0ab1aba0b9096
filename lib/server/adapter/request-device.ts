import { headers } from "next/headers";
import { deviceWords } from "@/lib/server/auth/device-words";

/** What the request's browser says it is, in words, for the list of sign-ins. */
export async function requestDevice(): Promise<string> {
  return deviceWords((await headers()).get("user-agent"));
}
