import { Busy } from "@/components/ui/busy";
import { Skeleton } from "@/components/ui/skeleton";

/** Holds the places of title and sheet; fades in late, so that quick pages never flash it. */
export default function Loading() {
  return (
    <div className="late pt-6">
      <Skeleton className="h-11 w-72 max-w-full" />
      <div className="mt-6">
        <Busy>Reading the log</Busy>
      </div>
      <Skeleton className="mt-6 h-64 w-full" />
    </div>
  );
}
