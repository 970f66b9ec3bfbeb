import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { SHOWN, type DraftRole, type Shown } from "@/lib/client/callbacks";

export type MarksView = { typed: string; roleId: string; shown: Shown };

/** Narrows the table by name, by role and by what is so. */
export function MarksFilter({
  view,
  onChange,
  roles,
  published,
  children,
}: {
  view: MarksView;
  onChange: (view: MarksView) => void;
  roles: readonly DraftRole[];
  published: boolean;
  /** How many are shown. */
  children: string;
}) {
  const kinds = (Object.keys(SHOWN) as Shown[]).filter((kind) => kind !== "unsent" || published);
  return (
    <div className="mb-3 flex flex-wrap items-end gap-x-4 gap-y-2 print:hidden">
      <Field label="Find a singer" className="w-full max-w-56 max-md:max-w-none">
        <Input
          type="search"
          value={view.typed}
          onChange={(event) => onChange({ ...view, typed: event.currentTarget.value })}
        />
      </Field>
      <Field label="Role" className="w-48 max-md:w-full">
        <Select
          value={view.roleId}
          onChange={(event) => onChange({ ...view, roleId: event.currentTarget.value })}
        >
          <option value="">All roles</option>
          {roles.map((role) => (
            <option key={role.id} value={role.id}>
              {role.name}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Show" className="w-48 max-md:w-full">
        <Select
          value={view.shown}
          onChange={(event) => onChange({ ...view, shown: event.currentTarget.value as Shown })}
        >
          {kinds.map((kind) => (
            <option key={kind} value={kind}>
              {SHOWN[kind]}
            </option>
          ))}
        </Select>
      </Field>
      <p role="status" className="pb-2 text-sm text-ink-2">
        {children}
      </p>
    </div>
  );
}
