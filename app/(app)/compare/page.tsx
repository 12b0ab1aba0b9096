import type { Metadata } from "next";
import { filterValues, narrowedBy } from "@/app/(app)/sessions/search-params";
import { FilterForm } from "@/components/log/filter-form";
import { PageHeader } from "@/components/ui/page-header";
import { Tabs } from "@/components/ui/tabs";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";
import { compareGear } from "@/lib/server/compare/compare-gear";
import { filterChoices } from "@/lib/server/log/filter-choices";
import { COMPARE_BY, logQuery, parseCompareBy, parseLogFilter } from "@/lib/server/log/log-filter";
import { Comparison } from "./_components/comparison";
import { COMPARE_BY_WORDS } from "./search-params";

export const metadata: Metadata = { title: "Compare" };

export default async function ComparePage({ searchParams }: PageProps<"/compare">) {
  const user = await requireUser("/compare");
  const params = await searchParams;
  const filter = parseLogFilter(params);
  const by = parseCompareBy(params.by);
  const ctx = await requestContext();
  const [groups, choices] = await pageRead("/compare", () =>
    Promise.all([compareGear(ctx, filter, by), filterChoices(ctx)]),
  );
  const query = logQuery(filter);
  const hrefOf = (other: string) => `/compare${query}${query === "" ? "?" : "&"}by=${other}`;
  const tabs = COMPARE_BY.map((other) => ({
    href: hrefOf(other),
    label: COMPARE_BY_WORDS[other].tab,
    current: other === by,
  }));
  return (
    <>
      <PageHeader
        title="Which setup ran fastest?"
        subtitle="Your tagged sessions, gathered by what was ridden."
      />
      <Tabs label="Compare by" tabs={tabs} />
      <FilterForm
        action="/compare"
        values={filterValues(filter)}
        kept={{ by }}
        choices={choices}
        narrowedBy={narrowedBy(filter)}
      />
      <Comparison
        groups={groups}
        one={COMPARE_BY_WORDS[by].one}
        speed={user.units.speed}
        narrowed={narrowedBy(filter) > 0}
      />
    </>
  );
}
