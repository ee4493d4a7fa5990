'use client';

import {
  columnFilteringFeature,
  createColumnHelper,
  createFilteredRowModel,
  createSortedRowModel,
  filterFns,
  globalFilteringFeature,
  rowSortingFeature,
  sortFns,
  tableFeatures,
  useTable,
} from '@tanstack/react-table';
import Link from 'next/link';
import { useState } from 'react';
import { Field } from '@/components/ui/field';
import { TextInput } from '@/components/ui/input';
import { Cell, HeadCell, Table } from '@/components/ui/table';
import { cn } from '@/lib/cn';
import type { ProjectSummary } from '@/lib/domain/dto';
import { formatDay } from '@/lib/format/dates';
import { paths } from '@/lib/paths';

const features = tableFeatures({
  columnFilteringFeature,
  globalFilteringFeature,
  filteredRowModel: createFilteredRowModel(),
  filterFns,
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  sortFns,
});
const helper = createColumnHelper<typeof features, ProjectSummary>();
const columns = helper.columns([
  helper.accessor('number', { header: 'Number', sortFn: 'alphanumeric' }),
  helper.accessor('name', {
    header: 'Project',
    sortFn: 'text',
    cell: ({ row: { original } }) => (
      <Link href={paths.project(original.id)} className="text-link font-medium">
        {original.name}
      </Link>
    ),
  }),
  helper.accessor('client', { header: 'For', sortFn: 'text', cell: (cell) => cell.getValue() || '–' }),
  helper.accessor((project) => project.appointments.join(', '), {
    id: 'appointments',
    header: 'Your part',
    cell: (cell) => cell.getValue() || '–',
  }),
  helper.accessor('sectionCount', { header: 'Sections', sortFn: 'basic', enableGlobalFilter: false }),
  helper.accessor('updatedAt', {
    header: 'Last change',
    sortFn: 'basic',
    enableGlobalFilter: false,
    cell: (cell) => <time dateTime={cell.getValue()}>{formatDay(cell.getValue())}</time>,
  }),
]);

const hiddenWhenNarrow: Record<string, string> = {
  client: 'hidden md:table-cell',
  appointments: 'hidden lg:table-cell',
  updatedAt: 'hidden sm:table-cell',
};
const rightAligned = new Set(['sectionCount']);

/** The practice's projects; every column sorts, one line of text filters. */
export function ProjectTable({ projects }: { projects: ProjectSummary[] }) {
  const [sorting, setSorting] = useState([{ id: 'updatedAt', desc: true }]);
  const [globalFilter, setGlobalFilter] = useState('');
  const table = useTable({
    features,
    columns,
    data: projects,
    state: { sorting, globalFilter },
    onSortingChange: setSorting,
    onGlobalFilterChange: setGlobalFilter,
    globalFilterFn: 'includesString',
  });
  const { rows } = table.getRowModel();
  const count =
    rows.length === projects.length ? `${projects.length} in all` : `${rows.length} of ${projects.length}`;
  return (
    <div className="grid gap-5">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <Field label="Find" className="w-full max-w-xs">
          <TextInput
            type="search"
            value={globalFilter}
            placeholder="number, name, client or part"
            onChange={(event) => setGlobalFilter(event.target.value)}
          />
        </Field>
        <p role="status" className="figures text-sm text-secondary">
          {count}
        </p>
      </div>
      <Table caption="Projects">
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const sorted = header.column.getIsSorted();
                return (
                  <HeadCell
                    key={header.id}
                    aria-sort={sorted === 'asc' ? 'ascending' : sorted === 'desc' ? 'descending' : 'none'}
                    className={cn(
                      hiddenWhenNarrow[header.column.id],
                      rightAligned.has(header.column.id) && 'text-right',
                    )}
                  >
                    <button
                      type="button"
                      onClick={header.column.getToggleSortingHandler()}
                      className="inline-flex min-h-6 items-center gap-1 hover:text-ink"
                    >
                      <table.FlexRender header={header} />
                      <span aria-hidden className="w-2.5 text-left">
                        {sorted === 'asc' ? '↑' : sorted === 'desc' ? '↓' : ''}
                      </span>
                    </button>
                  </HeadCell>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id} className="hover:bg-paper">
              {row.getAllCells().map((cell) => (
                <Cell
                  key={cell.id}
                  className={cn(
                    hiddenWhenNarrow[cell.column.id],
                    rightAligned.has(cell.column.id) && 'pr-9 text-right',
                  )}
                >
                  <table.FlexRender cell={cell} />
                </Cell>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
      {rows.length === 0 && (
        <p className="text-secondary">
          No project matches “{globalFilter}”.{' '}
          <button type="button" className="text-link" onClick={() => setGlobalFilter('')}>
            Show all
          </button>
        </p>
      )}
    </div>
  );
}
