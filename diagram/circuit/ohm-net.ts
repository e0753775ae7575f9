/** A conductor between two nodes; 0 ohm joins them into one. */
export interface OhmBranch {
  a: number;
  b: number;
  ohm: number;
}

/** A node taken out of the net: its neighbours then, with the share of its conductance that each had. */
interface Step {
  node: number;
  /** S, to all neighbours together */
  sum: number;
  neighbours: number[];
  shares: number[];
}

/**
 * Conductors seen from one root: the resistance to every node with all paths together, and the volts lost on the way to
 * every node when currents are drawn. Rings are reckoned as rings. Nodes are taken out one by one, those farthest from the
 * root first, each replaced by branches among its neighbours (star-mesh); of the inverse only the entries that belong to a
 * branch are worked out on the way back. A home is nearly a tree, so that time grows with its size alone. What hangs on a
 * node by itself comes to the same, to the last digit, whatever else there is.
 */
export class OhmNet {
  private readonly leader = new Map<number, number>();
  private readonly steps: Step[] = [];
  private readonly inverse = new Map<number, Map<number, number>>();
  private readonly root: number;

  /** @param branches ohm >= 0 each */
  constructor(branches: readonly OhmBranch[], root: number) {
    for (const { a, b, ohm } of branches) {
      const x = this.find(a);
      const y = this.find(b);
      if (ohm === 0 && x !== y) this.leader.set(y, x);
    }
    this.root = this.find(root);
    const net = new Map<number, Map<number, number>>([[this.root, new Map()]]);
    const join = (a: number, b: number, siemens: number) => {
      for (const [x, y] of [
        [a, b],
        [b, a],
      ] as const) {
        const around = net.get(x) ?? new Map<number, number>();
        net.set(x, around.set(y, (around.get(y) ?? 0) + siemens));
      }
    };
    for (const { a, b, ohm } of branches) {
      const x = this.find(a);
      const y = this.find(b);
      if (x !== y && ohm > 0) join(x, y, 1 / ohm);
    }
    this.eliminate(net, join);
    this.invert();
  }

  /** Ohm between the root and a node; undefined where nothing joins them. */
  ohmTo(node: number): number | undefined {
    if (!this.leader.has(node)) return undefined;
    const at = this.find(node);
    return at === this.root ? 0 : this.inverse.get(at)?.get(at);
  }

  /** V below the root at each node while currents are drawn from nodes, A; a node that nothing joins to the root has none. */
  drops(drawn: ReadonlyMap<number, number>): (node: number) => number {
    const amps = new Map<number, number>();
    const add = (node: number, current: number) => amps.set(node, (amps.get(node) ?? 0) + current);
    for (const [node, current] of drawn) add(this.find(node), current);
    for (const { node, neighbours, shares } of this.steps)
      neighbours.forEach((neighbour, i) => add(neighbour, shares[i]! * (amps.get(node) ?? 0)));
    const volts = new Map<number, number>([[this.root, 0]]);
    for (const { node, sum, neighbours, shares } of [...this.steps].reverse()) {
      const above = neighbours.reduce((total, neighbour, i) => total + shares[i]! * (volts.get(neighbour) ?? 0), 0);
      volts.set(node, above + (amps.get(node) ?? 0) / sum);
    }
    return (node) => volts.get(this.find(node)) ?? 0;
  }

  private find(node: number): number {
    let at = node;
    for (let up = this.leader.get(at); up !== undefined && up !== at; up = this.leader.get(at)) at = up;
    this.leader.set(node, at);
    if (!this.leader.has(at)) this.leader.set(at, at);
    return at;
  }

  /** Nodes that the root reaches, the farthest first: what hangs on a node is gone before it, whatever else there is. */
  private order(net: ReadonlyMap<number, ReadonlyMap<number, number>>): number[] {
    const reached = new Set([this.root]);
    for (const node of reached) for (const neighbour of net.get(node)!.keys()) reached.add(neighbour);
    reached.delete(this.root);
    return [...reached].reverse();
  }

  private eliminate(
    net: Map<number, Map<number, number>>,
    join: (a: number, b: number, siemens: number) => void,
  ): void {
    for (const node of this.order(net)) {
      const around = [...net.get(node)!];
      const sum = around.reduce((total, [, siemens]) => total + siemens, 0);
      net.delete(node);
      for (const [neighbour] of around) net.get(neighbour)!.delete(node);
      around.forEach(([x, gx], i) => {
        for (const [y, gy] of around.slice(i + 1)) join(x, y, (gx * gy) / sum);
      });
      this.steps.push({
        node,
        sum,
        neighbours: around.map(([neighbour]) => neighbour),
        shares: around.map(([, siemens]) => siemens / sum),
      });
    }
  }

  /** Z of a node and its neighbours from those of its neighbours, the last node taken out first. */
  private invert(): void {
    const entry = (x: number, y: number): number => {
      if (x === this.root || y === this.root) return 0;
      return this.inverse.get(x)?.get(y) ?? this.inverse.get(y)?.get(x) ?? 0;
    };
    for (const { node, sum, neighbours, shares } of [...this.steps].reverse()) {
      const row = new Map<number, number>();
      for (const i of neighbours)
        row.set(
          i,
          neighbours.reduce((total, j, k) => total + shares[k]! * entry(j, i), 0),
        );
      row.set(node, 1 / sum + neighbours.reduce((total, i, k) => total + shares[k]! * row.get(i)!, 0));
      this.inverse.set(node, row);
    }
  }
}
