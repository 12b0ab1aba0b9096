import { EmptyState } from "@/components/ui/empty-state";
import { FigureList } from "@/components/ui/figure-list";
import { LinkButton } from "@/components/ui/link-button";
import { Pagination } from "@/components/ui/pagination";
import { Section } from "@/components/ui/section";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { logQuery, type LogFilter } from "@/lib/server/log/log-filter";
import type { Log } from "@/lib/server/log/list-log";
import { distanceFromM, type DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";
import { LogRows } from "./log-rows";
import { LogTable } from "./log-table";

/** The filtered log: totals of all that the filter leaves, one page of rows, or what to do when there is none. */
export function LogView(props: {
  log: Log;
  filter: LogFilter;
  units: { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
}) {
  const { log, filter, units } = props;
  if (!log.hasAny) {
    return (
      <EmptyState
        kind="first"
        title="No session in your log yet"
        action={
          <LinkButton look="main" href="/upload">
            Upload tracks
          </LinkButton>
        }
      >
        Drop the files from your watch: GPX, FIT, TCX, KML or a zip of them.
      </EmptyState>
    );
  }
  if (log.totals.sessions === 0) {
    return (
      <EmptyState
        kind="none"
        title="No session fits the filter"
        action={<LinkButton href="/sessions">Clear the filter</LinkButton>}
      >
        Widen the dates or the wind, or choose another part.
      </EmptyState>
    );
  }
  const { totals } = log;
  const length = (metres: number) => formatNumber(distanceFromM(metres, units.distance), 1);
  return (
    <>
      <Section id="totals" title="Totals" reading="Of all sessions that the filter leaves.">
        <div className="grid gap-x-10 sm:grid-cols-2 lg:grid-cols-3">
          <FigureList
            figures={[
              { label: "Sessions", value: String(totals.sessions) },
              { label: "Time out", value: formatDuration(totals.elapsedS) },
            ]}
          />
          <FigureList
            figures={[
              { label: "Under way", value: length(totals.waterDistanceM), unit: units.distance },
              { label: "On foil", value: length(totals.onFoilDistanceM), unit: units.distance },
            ]}
          />
          <FigureList
            figures={[
              { label: "Time on foil", value: formatDuration(totals.onFoilTimeS) },
              { label: "Bump rides", value: String(totals.bumpRides) },
            ]}
          />
        </div>
      </Section>
      <Section
        id="log"
        title="The log"
        reading="A head sorts by its figure; again, the other way round."
        actions={
          <LinkButton size="small" href={`/api/log${logQuery(filter)}`} prefetch={false}>
            CSV of what is filtered
          </LinkButton>
        }
      >
        <div className="hidden sm:block">
          <LogTable rows={log.rows} filter={filter} units={units} />
        </div>
        <div className="sm:hidden">
          <LogRows rows={log.rows} units={units} />
        </div>
        <Pagination
          page={log.page}
          pages={log.pages}
          hrefOf={(page) => `/sessions${logQuery(filter, { page })}`}
          label="Pages of the log"
        />
      </Section>
    </>
  );
}
