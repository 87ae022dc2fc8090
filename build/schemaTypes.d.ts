/**
 * As much of the schema library's types as gives the type of what a schema describes; it stands in for that
 * library beside the declarations of our own.
 */
interface Described<Type> {
  readonly described: Type;
}
type DescribedBy<Schema> = Schema extends Described<infer Type> ? Type : never;
type Shape = { readonly [key: string]: Described<unknown> };

export declare namespace z {
  namespace core {
    type $strict = 'strict';
    type $loose = 'loose';
    type $strip = 'strip';
  }
  interface ZodString extends Described<string> {}
  interface ZodNumber extends Described<number> {}
  interface ZodInt extends Described<number> {}
  interface ZodBoolean extends Described<boolean> {}
  interface ZodNull extends Described<null> {}
  interface ZodUnknown extends Described<unknown> {}
  interface ZodLiteral<Value> extends Described<Value> {}
  interface ZodEnum<Values> extends Described<Values[keyof Values]> {}
  interface ZodNullable<Inner extends Described<unknown>> extends Described<Inner['described'] | null> {}
  interface ZodArray<Inner extends Described<unknown>> extends Described<Inner['described'][]> {}
  interface ZodUnion<Members extends readonly Described<unknown>[]>
    extends Described<DescribedBy<Members[number]>> {}
  interface ZodTuple<Members extends readonly Described<unknown>[], Rest = null>
    extends Described<{ [Index in keyof Members]: DescribedBy<Members[Index]> }> {}
  interface ZodRecord<Key extends Described<string>, Value extends Described<unknown>>
    extends Described<Record<Key['described'], Value['described']>> {}
  interface ZodObject<Members extends Shape, Strictness = core.$strip>
    extends Described<
      { [Key in keyof Members]: Members[Key]['described'] } & (Strictness extends core.$loose
        ? { [key: string]: unknown }
        : unknown)
    > {}
  type infer<Schema extends Described<unknown>> = Schema['described'];
}
