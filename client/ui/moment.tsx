/** A time as one says it: "today 14:02", "yesterday 9:15", "12 Nov 2026". The full time stands in the title. */
export function Moment({ at }: { readonly at: string }) {
  const date = new Date(at);
  return (
    <time dateTime={at} title={date.toLocaleString("en-GB", { dateStyle: "long", timeStyle: "short" })}>
      {sayMoment(date, new Date())}
    </time>
  );
}

export function sayMoment(date: Date, now: Date): string {
  const time = date.toLocaleTimeString("en-GB", { hour: "2-digit", minute: "2-digit" });
  const days = daysBetween(date, now);
  if (days === 0) return `today ${time}`;
  if (days === 1) return `yesterday ${time}`;
  if (days === -1) return `tomorrow ${time}`;
  return date.toLocaleDateString("en-GB", { day: "numeric", month: "short", year: "numeric" });
}

/** Whole calendar days where the reader is, whatever the hours. */
function daysBetween(date: Date, now: Date): number {
  const midnight = (of: Date) => Date.UTC(of.getFullYear(), of.getMonth(), of.getDate());
  return Math.round((midnight(now) - midnight(date)) / 86_400_000);
}
