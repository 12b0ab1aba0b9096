import { notFound, redirect } from "next/navigation";
import { AppError } from "@/lib/errors/app-error";
import { scrubParameters } from "@/lib/server/context/error-facts";
import { logDenial } from "./log-denial";

/** Runs a page's read, or an action that has no form state to answer with; what is not there or not yours is the not-found page, signed out leads to sign-in. */
export async function pageRead<T>(from: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof AppError) {
      if (error.code === "not_found" || error.code === "forbidden") {
        await logDenial(error);
        notFound();
      }
      if (error.code === "unauthenticated") redirect(`/sign-in?next=${encodeURIComponent(from)}`);
    }
    // It goes on to Next, which prints it as it is.
    scrubParameters(error);
    throw error;
  }
}
