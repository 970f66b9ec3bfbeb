"use client";

import { useRouter } from "next/navigation";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { Cell, ColumnHead, RowHead, Table } from "@/components/ui/table";
import { setTravel } from "../../actions";

type Venue = { id: string; name: string };

/** Every pair of venues once: a venue's row has a field under each venue that comes after it. */
export function TravelForm({
  companyId,
  venues,
  travel,
}: {
  companyId: string;
  venues: readonly Venue[];
  travel: readonly { a: string; b: string; minutes: number }[];
}) {
  const router = useRouter();
  const known = new Map(travel.map(({ a, b, minutes }) => [[a, b].sort().join(" "), minutes]));
  const pairs = venues.flatMap((a, index) =>
    venues.slice(index + 1).map((b) => ({
      a: a.id,
      b: b.id,
      minutes: String(known.get([a.id, b.id].sort().join(" ")) ?? ""),
    })),
  );
  const state = useActionForm({
    schema: () => import("@/lib/schemas/rooms").then((m) => m.setTravelSchema),
    action: setTravel,
    defaultValues: { companyId, pairs },
    onDone: (_, form) => {
      form.reset(form.getValues());
      showToast({ title: "The ways are saved." });
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  const place = new Map(pairs.map(({ a, b }, index) => [`${a} ${b}`, index]));
  return (
    <ActionForm state={state} submitLabel="Save the ways" className="max-w-3xl">
      <Table caption="Minutes between venues" className="w-auto">
        <thead>
          <tr>
            <ColumnHead>
              <span className="sr-only">From</span>
            </ColumnHead>
            {venues.slice(1).map((venue) => (
              <ColumnHead key={venue.id}>{venue.name}</ColumnHead>
            ))}
          </tr>
        </thead>
        <tbody>
          {venues.slice(0, -1).map((from) => (
            <tr key={from.id}>
              <RowHead>{from.name}</RowHead>
              {venues.slice(1).map((to) => {
                const index = place.get(`${from.id} ${to.id}`);
                return (
                  <Cell key={to.id}>
                    {index !== undefined && (
                      <Field
                        label={`Minutes from ${from.name} to ${to.name}`}
                        labelHidden
                        error={formState.errors.pairs?.[index]?.minutes?.message}
                        className="w-24"
                      >
                        <Input
                          inputMode="numeric"
                          maxLength={4}
                          autoComplete="off"
                          {...register(`pairs.${index}.minutes`)}
                        />
                      </Field>
                    )}
                  </Cell>
                );
              })}
            </tr>
          ))}
        </tbody>
      </Table>
    </ActionForm>
  );
}
