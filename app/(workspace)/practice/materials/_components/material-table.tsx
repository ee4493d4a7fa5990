'use client';

import { ConfirmButton } from '@/components/form/confirm-button';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import type { LibraryMaterial } from '@/lib/domain/dto';
import { formatPowerOfTen, sourceWords } from '@/lib/format/words';
import { removeMaterial } from '../actions';
import { MaterialDialog } from './material-dialog';

/** The materials of the practice. */
export function MaterialTable({
  materials,
  mayChange,
}: {
  materials: LibraryMaterial[];
  mayChange: boolean;
}) {
  if (materials.length === 0) return <p className="text-secondary">Nothing in the library yet.</p>;
  return (
    <Table caption="Materials">
      <thead>
        <tr>
          <HeadCell>Name</HeadCell>
          <HeadCell>k along, m/s</HeadCell>
          <HeadCell>k across, m/s</HeadCell>
          <HeadCell className="hidden sm:table-cell">From</HeadCell>
          <HeadCell className="hidden md:table-cell">Saturated, kN/m³</HeadCell>
          {mayChange && (
            <HeadCell>
              <span className="sr-only">Change</span>
            </HeadCell>
          )}
        </tr>
      </thead>
      <tbody>
        {materials.map((entry) => {
          const { id, material, note } = entry;
          return (
            <tr key={id}>
              <RowHead>
                {material.name}
                {note && (
                  <span className="block max-w-[40ch] text-sm font-normal text-secondary">{note}</span>
                )}
              </RowHead>
              <Cell className="whitespace-nowrap">{formatPowerOfTen(material.kMajor)}</Cell>
              <Cell className="whitespace-nowrap">{formatPowerOfTen(material.kMinor)}</Cell>
              <Cell className="hidden sm:table-cell">
                {material.kSource ? sourceWords[material.kSource] : 'not said'}
              </Cell>
              <Cell className="hidden md:table-cell">{material.saturatedUnitWeight ?? '–'}</Cell>
              {mayChange && (
                <Cell className="pr-0">
                  <div className="flex flex-wrap justify-end gap-x-4">
                    <MaterialDialog
                      entry={entry}
                      trigger="Edit"
                      accessibleTrigger={`Edit ${material.name}`}
                      title="Edit the material"
                    />
                    <ConfirmButton
                      label="Remove"
                      accessibleLabel={`Remove ${material.name}`}
                      title={`Remove ${material.name} from the library?`}
                      consequence="Sections that use it keep their own copy."
                      confirmLabel="Remove"
                      action={() => removeMaterial({ id })}
                    />
                  </div>
                </Cell>
              )}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
