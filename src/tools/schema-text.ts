import { toJsonSchema } from '@valibot/to-json-schema';
import { designShape } from '../design/shape.ts';

/** The published JSON Schema (draft 2020-12) of the design document, as text. */
export function schemaText(): string {
  const schema = toJsonSchema(designShape, { target: 'draft-2020-12' });
  const { $schema, ...rest } = schema;
  return `${JSON.stringify({ $schema, $id: 'halfmark-design-1.schema.json', title: 'Halfmark design, version 1', description: 'A layer stack with its contacts. Quantities are strings with a unit, as typed, or expressions over the variables.', ...rest }, null, 1)}\n`;
}
