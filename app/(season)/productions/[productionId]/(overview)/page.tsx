import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { Chip } from "@/components/ui/chip";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readRoad } from "@/lib/data/season/road";
import { dayOfYear } from "@/lib/format-dates";
import { stageName } from "../../../_components/stage-name";
import { ProductionForm } from "./_components/production-form";
import { RoadList } from "./_components/road-list";
import { WhoIsWho } from "./_components/who-is-who";

export const metadata: Metadata = { title: "Production" };

function runInWords(opensOn: string | null, closesOn: string | null): string {
  if (opensOn === null) return closesOn === null ? "no dates yet" : `to ${dayOfYear(closesOn)}`;
  if (closesOn === null || closesOn === opensOn) return `opens ${dayOfYear(opensOn)}`;
  return `${dayOfYear(opensOn)} to ${dayOfYear(closesOn)}`;
}

export default async function ProductionPage({ params }: PageProps<"/productions/[productionId]">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}`);
  const road = await orNotFound(readRoad(actor, productionId));
  const { production } = road;
  return (
    <>
      <PageTitle
        title={<cite className="text-[1em]">{production.title}</cite>}
        sub={`${production.companyName}, ${runInWords(production.opensOn, production.closesOn)}. Times are those of ${production.zone.replaceAll("_", " ")}.`}
        chips={<Chip tone="info">{stageName(production.stage)}</Chip>}
      />
      <SideColumn
        sideLabel="About the production"
        side={
          <>
            {road.people && <WhoIsWho productionId={production.id} people={road.people} />}
            {road.mayChange && (
              <ProductionForm
                productionId={production.id}
                version={production.version}
                title={production.title}
                stage={production.stage}
                opensOn={production.opensOn}
                closesOn={production.closesOn}
              />
            )}
          </>
        }
      >
        <RoadList road={road} />
      </SideColumn>
    </>
  );
}
