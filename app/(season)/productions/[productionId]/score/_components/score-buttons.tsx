"use client";

import { lazy } from "react";
import type { ScoreNumber, ScoreRole } from "@/lib/score/score-view";
import { LazyDialogButton } from "./lazy-dialog-button";

const loadNumber = () => import("./number-dialog");
const loadRole = () => import("./role-dialog");
const loadRead = () => import("./read-score-dialog");
const NumberDialog = lazy(loadNumber);
const RoleDialog = lazy(loadRole);
const ReadScoreDialog = lazy(loadRead);

export function AddNumberButton({ productionId }: { productionId: string }) {
  return (
    <LazyDialogButton
      load={loadNumber}
      dialog={(props) => <NumberDialog {...props} productionId={productionId} number={null} />}
    >
      Add a number
    </LazyDialogButton>
  );
}

export function EditNumberButton({
  productionId,
  number,
}: {
  productionId: string;
  number: ScoreNumber;
}) {
  return (
    <LazyDialogButton
      load={loadNumber}
      dialog={(props) => <NumberDialog {...props} productionId={productionId} number={number} />}
    >
      Change the number
    </LazyDialogButton>
  );
}

export function AddRoleButton({ productionId }: { productionId: string }) {
  return (
    <LazyDialogButton
      load={loadRole}
      dialog={(props) => <RoleDialog {...props} productionId={productionId} role={null} />}
    >
      Add a role
    </LazyDialogButton>
  );
}

export function EditRoleButton({ productionId, role }: { productionId: string; role: ScoreRole }) {
  return (
    <LazyDialogButton
      load={loadRole}
      dialog={(props) => <RoleDialog {...props} productionId={productionId} role={role} />}
    >
      Change the role
    </LazyDialogButton>
  );
}

export function ReadScoreButton({ productionId }: { productionId: string }) {
  return (
    <LazyDialogButton
      kind="primary"
      load={loadRead}
      dialog={(props) => <ReadScoreDialog {...props} productionId={productionId} />}
    >
      Read a score (MusicXML)
    </LazyDialogButton>
  );
}
