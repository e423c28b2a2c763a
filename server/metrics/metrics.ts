/** Numbers about a running server, in the text format that Prometheus reads (exposition format 0.0.4). */

type Labels = Readonly<Record<string, string>>;

export interface Counter {
  add(labels?: Labels, amount?: number): void;
}
export interface Histogram {
  observe(seconds: number, labels?: Labels): void;
}
interface Family {
  readonly lines: () => readonly string[];
}

const escaped = (value: string) => value.replace(/[\\"\n]/g, (sign) => (sign === "\n" ? "\\n" : `\\${sign}`));

function labelled(name: string, labels: Labels): string {
  const parts = Object.entries(labels).map(([label, value]) => `${label}="${escaped(value)}"`);
  return parts.length === 0 ? name : `${name}{${parts.join(",")}}`;
}

/** Label values come from our own code, never from requests: each distinct set is kept for ever. */
export class Metrics {
  readonly #families = new Map<string, Family>();

  counter(name: string, help: string): Counter {
    const values = new Map<string, number>();
    this.#add(name, "counter", help, () => [...values].map(([series, value]) => `${series} ${value}`));
    return {
      add(labels = {}, amount = 1) {
        const series = labelled(name, labels);
        values.set(series, (values.get(series) ?? 0) + amount);
      },
    };
  }

  /** Read when someone asks. */
  gauge(name: string, help: string, read: () => number): void {
    this.#add(name, "gauge", help, () => [`${name} ${read()}`]);
  }

  /** A number that only grows and is counted elsewhere. */
  total(name: string, help: string, read: () => number): void {
    this.#add(name, "counter", help, () => [`${name} ${read()}`]);
  }

  histogram(name: string, help: string, bounds: readonly number[]): Histogram {
    const series = new Map<string, { labels: Labels; counts: number[]; sum: number; count: number }>();
    this.#add(name, "histogram", help, () =>
      [...series.values()].flatMap(({ labels, counts, sum, count }) => [
        ...bounds.map((bound, index) => {
          const within = counts[index] ?? 0;
          return `${labelled(`${name}_bucket`, { ...labels, le: String(bound) })} ${within}`;
        }),
        `${labelled(`${name}_bucket`, { ...labels, le: "+Inf" })} ${count}`,
        `${labelled(`${name}_sum`, labels)} ${sum}`,
        `${labelled(`${name}_count`, labels)} ${count}`,
      ]),
    );
    return {
      observe(seconds, labels = {}) {
        const key = labelled(name, labels);
        const seen = series.get(key) ?? { labels, counts: bounds.map(() => 0), sum: 0, count: 0 };
        series.set(key, seen);
        for (const [index, bound] of bounds.entries())
          if (seconds <= bound) seen.counts[index] = (seen.counts[index] ?? 0) + 1;
        seen.sum += seconds;
        seen.count += 1;
      },
    };
  }

  text(): string {
    return [...this.#families.values()].map(({ lines }) => `${lines().join("\n")}\n`).join("");
  }

  #add(name: string, type: string, help: string, lines: () => readonly string[]): void {
    if (this.#families.has(name)) throw new Error(`${name} is measured twice`);
    this.#families.set(name, {
      lines: () => [`# HELP ${name} ${help}`, `# TYPE ${name} ${type}`, ...lines()],
    });
  }
}
