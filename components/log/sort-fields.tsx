import { SelectField } from "@/components/ui/fields";

const SORTS = [
  { value: "start", label: "Start" },
  { value: "distance", label: "Distance under way" },
  { value: "onFoilDistance", label: "Distance on foil" },
  { value: "onFoilTime", label: "Time on foil" },
  { value: "onFoilShare", label: "On-foil share" },
  { value: "longest", label: "Longest on-foil segment" },
  { value: "bumpSpeed", label: "Bump-riding speed" },
  { value: "glide", label: "Glide ratio" },
  { value: "best2s", label: "Best 2 s" },
  { value: "best10s", label: "Best 10 s" },
  { value: "best500m", label: "Best 500 m" },
  { value: "bestNm", label: "Best nautical mile" },
  { value: "wind", label: "Wind" },
] as const;

const ORDERS = [
  { value: "desc", label: "Most or newest first" },
  { value: "asc", label: "Least or oldest first" },
] as const;

/** Sorting by form, for where the heads of the table are not shown. */
export function SortFields(props: { sort: string; order: string }) {
  return (
    <div className="grid grid-cols-1 gap-4 sm:grid-cols-2 lg:grid-cols-5">
      <SelectField name="sort" label="Sort by" options={SORTS} defaultValue={props.sort} />
      <SelectField name="order" label="Order" options={ORDERS} defaultValue={props.order} />
    </div>
  );
}
