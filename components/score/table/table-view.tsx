'use client';
import { MaterialsPart, ZonesPart } from './ground-parts';
import { BarriersPart, LinesPart } from './line-parts';
import { PiezometersPart, SectionPart, SituationsPart, StructuresPart } from './matter-parts';

/** The same section as tables: every part of it, every number editable in place, all of it by keyboard. */
export function TableView() {
  return (
    <div>
      <SectionPart />
      <SituationsPart />
      <MaterialsPart />
      <ZonesPart />
      <BarriersPart />
      <LinesPart kind="edges" />
      <LinesPart kind="drains" />
      <StructuresPart />
      <PiezometersPart />
    </div>
  );
}
