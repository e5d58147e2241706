import { z } from 'zod';

export type JsonSchema = Record<string, unknown>;
type Direction = 'input' | 'output';

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function without(key: string, record: JsonSchema): JsonSchema {
  return Object.fromEntries(Object.entries(record).filter(([name]) => name !== key));
}

/** A copy with every reference into `$defs` turned into one into the components of the document. */
function rewriteRefs(value: unknown, nameOf: (id: string) => string): unknown {
  if (Array.isArray(value)) return value.map((item) => rewriteRefs(item, nameOf));
  if (!isRecord(value)) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, item]) => {
      const id = key === '$ref' && typeof item === 'string' && /^#\/\$defs\/(.+)$/.exec(item)?.[1];
      return [key, id ? `#/components/schemas/${nameOf(id)}` : rewriteRefs(item, nameOf)];
    }),
  );
}

/**
 * Turns zod schemas into those of OpenAPI 3.1, which are plain JSON Schema. A schema with `.meta({ id })` becomes
 * a component; what may be sent and what is answered differ (defaults, transforms), so the names differ too.
 */
export class JsonSchemas {
  readonly components: Record<string, JsonSchema> = {};

  of(schema: z.ZodType, direction: Direction): JsonSchema {
    const id = schema.meta()?.id;
    const { $defs, ...inline } = this.convert(schema, direction);
    const nameOf = (name: string) =>
      direction === 'output' || name.endsWith('Request') ? name : `${name}Input`;
    const keep = (name: string, content: unknown) => {
      this.components[nameOf(name)] = without('id', rewriteRefs(content, nameOf) as JsonSchema);
    };
    for (const [name, content] of Object.entries(isRecord($defs) ? $defs : {})) keep(name, content);
    if (id === undefined) return rewriteRefs(inline, nameOf) as JsonSchema;
    keep(id, inline);
    return { $ref: `#/components/schemas/${nameOf(id)}` };
  }

  private convert(schema: z.ZodType, io: Direction): JsonSchema {
    return without('$schema', {
      ...z.toJSONSchema(schema, { io, unrepresentable: 'any', cycles: 'ref' }),
    });
  }
}
