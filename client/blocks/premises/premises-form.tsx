import { lazy, Suspense } from "react";
import { fieldKinds } from "#engine/premises/theory.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import { shownEvaluation } from "../block-parts.ts";
import { useBlock } from "../block-handle.ts";
import { ChoiceField } from "../parts/choice-field.tsx";
import { Figure } from "../parts/figure.tsx";
import { RowTable } from "../parts/row-table.tsx";
import { TextField } from "../parts/text-field.tsx";
import { Formula } from "../../ui/math.tsx";
import { FieldsTable } from "./fields-table.tsx";
import { TermsTable } from "./terms-table.tsx";
import { useRenamedSymbol } from "./use-renamed-symbol.ts";

const RenameOffer = lazy(async () => ({ default: (await import("./rename-offer.tsx")).RenameOffer }));

/** The premises of a theory: what stands here, everything else computes from. Readings stand beside what is typed. */
export function PremisesForm() {
  const block = useBlock();
  // Premises' value is what the engine's premises folder gives.
  const value = shownEvaluation(block).evaluation?.value as PremisesValue | null | undefined;
  const scales = new Map(value?.scales.map((scale) => [scale.rowId, scale]));
  // A scale given by others, "p/Lambda", is worth saying in numbers; "3.2(4) TeV" says itself.
  const derived = new Map(
    (block.tables["scales"] ?? []).flatMap(({ id, value: typed = "" }) => {
      const size = scales.get(id)?.size;
      return size && /[A-Za-z]/.test(typed.replace(size.unit, "").replace(/e(?=[-+0-9])/gi, ""))
        ? [
            [
              id,
              <Figure key={id} scalar={`${id}/value`}>
                {size.text}
              </Figure>,
            ] as const,
          ]
        : [];
    }),
  );
  const { watching, renamed, forget } = useRenamedSymbol();
  const anisotropic = block.fields["geometry"] === "anisotropic";
  return (
    <div className="premises-form">
      <div className="premises-space">
        <ChoiceField
          place={{ field: "geometry" }}
          label="geometry"
          showLabel
          options={[
            { value: "isotropic", label: "space and time alike" },
            { value: "anisotropic", label: "space and time scale apart" },
          ]}
        />
        {anisotropic ? (
          <>
            <TextField place={{ field: "D" }} label="space dimensions D" showLabel size={4} />
            <TextField place={{ field: "z" }} label="time counts z" showLabel size={4} />
          </>
        ) : (
          <TextField place={{ field: "d" }} label="spacetime dimension d" showLabel size={4} />
        )}
        {value && (
          <span className="premises-measure">
            <Formula latex={value.spacetimeLatex} />
          </span>
        )}
      </div>
      {/* The keys belong to the fields inside. */}
      <div className="premises-tables" {...watching}>
        <FieldsTable value={value ?? null} kinds={fieldKinds} />
        <div className="premises-side">
          <RowTable
            table="scales"
            noun="scale"
            caption="Scales"
            nameOf={(row) => row["symbol"] ?? ""}
            invitation="Lambda"
            columns={[
              {
                column: "symbol",
                heading: "symbol",
                size: 7,
                placeholder: "Lambda",
                reading: (row) => drawn(scales.get(row.id)?.latex),
              },
              { column: "value", heading: "value", placeholder: "3.2(4) TeV", size: 12 },
              { column: "role", heading: "role", options: ["heavy", "probe", "light", "other"] },
              { column: "meaning", heading: "meaning", notation: false, size: 12 },
            ]}
            results={derived.size === 0 ? [] : [{ heading: "is", show: (row) => derived.get(row.id) }]}
          />
          <RowTable
            table="symmetries"
            noun="symmetry"
            caption="Symmetries"
            nameOf={(row) => row["name"] ?? ""}
            invitation="reflection"
            columns={[
              { column: "name", heading: "name", notation: false, size: 12, placeholder: "reflection" },
              { column: "group", heading: "group", size: 6, placeholder: "Z2" },
              { column: "meaning", heading: "meaning", notation: false, size: 14 },
            ]}
          />
        </div>
      </div>
      {renamed && (
        <Suspense fallback={null}>
          <RenameOffer {...renamed} onClose={forget} />
        </Suspense>
      )}
      <TermsTable value={value ?? null} />
    </div>
  );
}

function drawn(latex: string | undefined) {
  return latex === undefined ? null : <Formula latex={latex} />;
}
