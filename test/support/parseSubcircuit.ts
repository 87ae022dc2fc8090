/** An element as a netlist has it, by the rules of SPICE and nothing else. */
export interface NetlistElement {
  readonly name: string;
  readonly nodes: readonly string[];
  /** Value of a resistor or capacitor; null elsewhere. */
  readonly value: number | null;
  /** Model or subcircuit; null for a resistor or capacitor. */
  readonly model: string | null;
  readonly parameters: Readonly<Record<string, number>>;
}

export interface Subcircuit {
  readonly name: string;
  readonly ports: readonly string[];
  readonly elements: readonly NetlistElement[];
}

const nodeCount: Readonly<Record<string, number>> = { R: 2, C: 2, Q: 3, M: 4 };

/** The subcircuits of a netlist text, by name. */
export function parseSubcircuits(text: string): ReadonlyMap<string, Subcircuit> {
  const found = new Map<string, Subcircuit>();
  // The first line of a SPICE file is its title, whatever it says.
  const lines = text
    .split('\n')
    .slice(1)
    .map((line) => line.trim());
  let open: { name: string; ports: string[]; elements: NetlistElement[] } | null = null;
  for (const line of lines) {
    if (line === '' || line.startsWith('*')) continue;
    const [first = '', ...rest] = line.split(/\s+/);
    if (first === '.subckt') open = { name: rest[0]!, ports: rest.slice(1), elements: [] };
    else if (first === '.ends' && open !== null) {
      found.set(open.name, open);
      open = null;
    } else if (open !== null && /^[RCQMX]/.test(first)) open.elements.push(element(first, rest));
  }
  return found;
}

function element(name: string, words: readonly string[]): NetlistElement {
  const plain = words.filter((word) => !word.includes('='));
  const parameters = Object.fromEntries(
    words
      .filter((word) => word.includes('='))
      .map((word) => {
        const [key, value] = word.split('=');
        return [key!, Number(value)];
      }),
  );
  const nodes = plain.slice(0, nodeCount[name[0]!] ?? plain.length - 1);
  const last = plain.at(-1)!;
  const passive = name[0] === 'R' || name[0] === 'C';
  return { name, nodes, value: passive ? Number(last) : null, model: passive ? null : last, parameters };
}
