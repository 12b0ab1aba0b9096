import type { Metadata } from "next";
import { FilterForm } from "@/components/log/filter-form";
import { SortFields } from "@/components/log/sort-fields";
import { PageHeader } from "@/components/ui/page-header";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";
import { filterChoices } from "@/lib/server/log/filter-choices";
import { listLog } from "@/lib/server/log/list-log";
import { parseLogFilter } from "@/lib/server/log/log-filter";
import { LogView } from "./_components/log-view";
import { filterValues, narrowedBy } from "./search-params";

export const metadata: Metadata = { title: "Sessions" };

export default async function SessionsPage({ searchParams }: PageProps<"/sessions">) {
  const user = await requireUser("/sessions");
  const filter = parseLogFilter(await searchParams);
  const ctx = await requestContext();
  const [log, choices] = await pageRead("/sessions", () =>
    Promise.all([listLog(ctx, filter), filterChoices(ctx)]),
  );
  return (
    <>
      <PageHeader
        title="Sessions"
        subtitle="Every outing on the water, what was ridden, and what came of it."
      />
      {log.hasAny && (
        <FilterForm
          action="/sessions"
          values={filterValues(filter)}
          kept={{}}
          choices={choices}
          narrowedBy={narrowedBy(filter)}
        >
          <SortFields sort={filter.sort} order={filter.order} />
        </FilterForm>
      )}
      <LogView log={log} filter={filter} units={user.units} />
    </>
  );
}
