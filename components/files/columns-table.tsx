'use client';
import { Select } from '@/components/ui/field';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ImportPreview } from '@/lib/schema/import';
import { FILE_UNITS, type FileUnitKey, fileUnitsOf, isFileUnit } from '@/lib/units/file-units';
import type { FilesPoint } from './files-data';

type Layout = ImportPreview['layout'];
type Shown = ImportPreview['columns'][number];

const isOf = (one: Layout['columns'][number], { column, sensor }: Shown) =>
  one.column === column && (one.sensor ?? null) === sensor;

/** Each column of the file, or each sensor that one names, on a row: its head, its first cells, and the point it goes to. */
export function ColumnsTable({
  layout,
  columns,
  times,
  points,
  onChange,
}: {
  layout: Layout;
  columns: ImportPreview['columns'];
  /** Of the first lines, as they are read. */
  times: string[];
  points: FilesPoint[];
  onChange: (layout: Layout) => void;
}) {
  const put = (from: Shown, to: { point: string; unit: FileUnitKey } | null) =>
    onChange({
      ...layout,
      columns: [
        ...layout.columns.filter((one) => !isOf(one, from) && one.point !== to?.point),
        ...(to === null
          ? []
          : [{ column: from.column, ...to, ...(from.sensor === null ? {} : { sensor: from.sensor }) }]),
      ].sort((a, b) => a.column - b.column),
    });
  return (
    <Table
      caption="Columns of the file"
      captionHidden
      columns={[
        { key: 'head', label: 'Column' },
        { key: 'sample', label: 'First lines', wideOnly: true },
        { key: 'point', label: 'Goes to' },
        { key: 'unit', label: 'Its unit in the file' },
      ]}
    >
      {columns.map((from) => {
        const { column, head, sample, unit } = from;
        const name = head === '' ? `Column ${column + 1}` : head;
        const chosen = layout.columns.find((one) => isOf(one, from));
        const point = points.find((one) => one.key === chosen?.point);
        const isTime = layout.timeColumns.includes(column);
        const shown = isTime && layout.timeColumns[0] === column ? times : sample;
        return (
          <Row key={`${column} ${from.sensor ?? ''}`}>
            <RowHead className="max-w-48 break-words">
              {name}
              <span className="block font-mono text-[0.85rem] font-normal sm:hidden">{shown[0]}</span>
            </RowHead>
            <Cell wideOnly className="font-mono text-[0.85rem]">
              {shown.slice(0, 3).map((cell, place) => (
                <span key={place} className="block whitespace-nowrap">
                  {cell}
                </span>
              ))}
            </Cell>
            {isTime ? (
              <Cell colSpan={2}>the time, as it is read</Cell>
            ) : (
              <>
                <Cell className="min-w-44 py-1">
                  <Select
                    label={`${name} goes to`}
                    labelHidden
                    value={chosen?.point ?? ''}
                    onChange={(event) => {
                      const to = points.find((one) => one.key === event.target.value);
                      const [first] = to === undefined ? [] : fileUnitsOf(to.unit);
                      if (to === undefined || first === undefined) return put(from, null);
                      const own =
                        unit !== null && isFileUnit(unit) && FILE_UNITS[unit].kept === to.unit ? unit : first;
                      put(from, { point: to.key, unit: own });
                    }}
                  >
                    <option value="">left out</option>
                    {points.map((one) => (
                      <option key={one.key} value={one.key}>
                        {one.name}
                      </option>
                    ))}
                  </Select>
                </Cell>
                <Cell className="min-w-36 py-1">
                  {chosen === undefined || point === undefined ? null : (
                    <Select
                      label={`Unit of ${name}`}
                      labelHidden
                      value={chosen.unit}
                      onChange={(event) => {
                        if (isFileUnit(event.target.value))
                          put(from, { point: chosen.point, unit: event.target.value });
                      }}
                    >
                      {fileUnitsOf(point.unit).map((key) => (
                        <option key={key} value={key}>
                          {FILE_UNITS[key].label}
                        </option>
                      ))}
                    </Select>
                  )}
                </Cell>
              </>
            )}
          </Row>
        );
      })}
    </Table>
  );
}
