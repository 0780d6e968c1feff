import {blankSheet} from '../fieldbook/blank-sheet.ts';
import {sheetSchema} from '../fieldbook/sheet-schema.ts';
import {STATUS} from './status.ts';

/** `stillmark sheet`: a blank field sheet, or its JSON Schema for an editor. */
export function printSheet({schema}: {readonly schema: boolean}): number {
  process.stdout.write(schema ? `${JSON.stringify(sheetSchema(), null, 2)}\n` : blankSheet());
  return STATUS.done;
}
