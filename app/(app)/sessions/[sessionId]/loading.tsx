import { Busy } from "@/components/ui/busy";
import { Skeleton } from "@/components/ui/skeleton";

/** Keeps the room of title, map and figures while the session is read. */
export default function SessionLoading() {
  return (
    <>
      <Busy>Reading the session</Busy>
      <Skeleton className="mt-6 h-10 w-2/3" />
      <Skeleton className="mt-2 h-6 w-1/2" />
      <div className="mt-8 grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <Skeleton className="h-80 w-full md:h-[26rem]" />
        <Skeleton className="h-80 w-full md:h-[26rem]" />
      </div>
    </>
  );
}
