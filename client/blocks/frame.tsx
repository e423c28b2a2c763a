import {
  Component,
  Suspense,
  useEffect,
  useState,
  type ErrorInfo,
  type KeyboardEvent,
  type ReactNode,
} from "react";
import { kindDescriptions } from "#engine/descriptions.ts";
import { classes } from "../ui/classes.ts";
import { shownEvaluation } from "./block-parts.ts";
import { useBlock, useLongWork, usePending, usePinCount, type LongWorkState } from "./block-handle.ts";
import { Notices, OtherProblems } from "./parts/problem-list.tsx";
import { TextField } from "./parts/text-field.tsx";
import { Working } from "./parts/working.tsx";
import { blockParts } from "./registry.tsx";
import { StandsOn } from "./stands-on.tsx";
import { isUntouched, sayProgress, stateOf, stateOfWork } from "./block-state.ts";

export interface BlockFrameProps {
  readonly selected: boolean;
  readonly onKeyDown: (event: KeyboardEvent) => void;
  /** Absent where the block cannot be moved or deleted. */
  readonly onMove?: (step: -1 | 1) => void;
  readonly onDelete?: () => void;
}

/** A block on the page: a ticked rule above, a hairline below, no box. */
export function BlockFrame({ selected, onKeyDown, onMove, onDelete }: BlockFrameProps) {
  const block = useBlock();
  const parts = blockParts[block.kind];
  const { title } = kindDescriptions[block.kind];
  const name = block.fields[parts.titleField] ?? "";
  const { evaluation, stale } = shownEvaluation(block);
  const value = evaluation?.value ?? null;
  return (
    // The keys are those of the fields and buttons inside; the section itself is not a control.
    // eslint-disable-next-line jsx-a11y-x/no-noninteractive-element-interactions -- see above
    <section
      className={classes("block", selected && "block-is-selected")}
      aria-label={name === "" ? title : `${title}: ${name}`}
      data-kind={block.kind}
      onKeyDown={onKeyDown}
    >
      <header className="block-head">
        {/* A named region and not a heading: it stands in sections of any level. */}
        <p className="block-kind engraved">{title}</p>
        <div className="block-title">
          <TextField
            place={{ field: parts.titleField }}
            label={parts.titleHint}
            placeholder={parts.titleHint}
            notation={false}
            size={Math.max(6, Math.min(40, (name || parts.titleHint).length))}
          />
        </div>
        {parts.summary && value !== null && <span className="block-summary">{parts.summary(block)}</span>}
        <StandsOn />
        <Pinned />
        {!block.readOnly && (
          <span className="block-tools">
            {onMove && (
              <>
                <button
                  type="button"
                  className="block-link"
                  aria-label={`move ${title} up`}
                  onClick={() => onMove(-1)}
                >
                  up
                </button>
                <button
                  type="button"
                  className="block-link"
                  aria-label={`move ${title} down`}
                  onClick={() => onMove(1)}
                >
                  down
                </button>
              </>
            )}
            {onDelete && (
              <button type="button" className="block-link" aria-label={`delete ${title}`} onClick={onDelete}>
                delete
              </button>
            )}
          </span>
        )}
        <StateWord />
      </header>
      <Guard blockId={block.blockId} inputs={block.fields}>
        <div className="block-body" data-block-body="">
          <div className={isUntouched(block) ? "block-invitation" : undefined}>
            <OtherProblems />
          </div>
          <div className="block-form">
            <Suspense fallback={<p className="block-awaited">fetching the form</p>}>
              <parts.Form />
            </Suspense>
          </div>
          {value !== null && (parts.Result || parts.Plot) && (
            <div
              className={classes(
                "block-outcome",
                stale && "block-outcome-stale",
                parts.Plot && "block-outcome-with-plot",
              )}
            >
              {parts.Result && (
                <div className="block-outcome-result">
                  <Suspense fallback={null}>
                    <parts.Result value={value} stale={stale} />
                  </Suspense>
                </div>
              )}
              {parts.Plot && (
                <div className="block-outcome-plot">
                  <Suspense fallback={null}>
                    <parts.Plot value={value} stale={stale} />
                  </Suspense>
                </div>
              )}
            </div>
          )}
          <Notices />
          {evaluation && <Working steps={evaluation.working} />}
          <Note />
        </div>
      </Guard>
    </section>
  );
}

/** The way to the sentences that rely on this block. */
function Pinned() {
  const { goToNextPin } = useBlock();
  const count = usePinCount();
  if (count === 0) return null;
  return (
    <button type="button" className="block-link" title="Go to the next sentence" onClick={goToNextPin}>
      {count === 1 ? "pinned once" : `pinned ${count} times`}
    </button>
  );
}

/** Words of the writers about the block. The empty line shows itself only to who might write in it. */
function Note() {
  const { fields, readOnly } = useBlock();
  if (!("note" in fields) || (readOnly && fields["note"] === "")) return null;
  return (
    <div className="block-note">
      <TextField
        place={{ field: "note" }}
        label="note"
        placeholder="a note on this block"
        notation={false}
        size={24}
      />
    </div>
  );
}

/** How long a computation may take before the page says that it computes. */
const QUIET_MS = 250;

function StateWord() {
  const block = useBlock();
  const pending = usePending();
  const late = useLate(pending);
  const work = useLongWork();
  const state = (late ? stateOfWork(work) : null) ?? stateOf(block, pending, late);
  return (
    <>
      <span className={`block-state block-state-${state.tone}`} role="status">
        <span className="block-state-mark" aria-hidden="true" />
        {state.words}
      </span>
      {late && work && <WorkControl work={work} />}
    </>
  );
}

/** How far long work is, and the way to stop it or to go on. */
function WorkControl({ work }: { readonly work: LongWorkState }) {
  const { stopLongWork, resumeLongWork } = useBlock();
  const isHeld = work.state === "stopped" || work.state === "failed";
  const progress = work.state === "computing" ? work.progress : null;
  return (
    <>
      {/* The words would be read aloud ten times a second; the bar says the same when asked. */}
      {progress !== null && (
        <span className="block-progress">
          <progress
            aria-label={progress.part === "" ? "progress" : progress.part}
            {...(progress.of === null ? {} : { value: progress.done, max: progress.of })}
          />{" "}
          <span aria-hidden="true">{sayProgress(progress)}</span>
        </span>
      )}
      <button type="button" className="block-link" onClick={isHeld ? resumeLongWork : stopLongWork}>
        {isHeld ? "go on" : "stop"}
      </button>
    </>
  );
}

function useLate(pending: boolean): boolean {
  const [late, setLate] = useState(false);
  useEffect(() => {
    if (!pending) return;
    const timer = setTimeout(() => setLate(true), QUIET_MS);
    return () => {
      clearTimeout(timer);
      setLate(false);
    };
  }, [pending]);
  return pending && late;
}

interface GuardProps {
  readonly blockId: string;
  /** A change of these is a new attempt. */
  readonly inputs: unknown;
  readonly children: ReactNode;
}

/** A mistake of ours in one block's drawing leaves the rest of the notebook alone. */
class Guard extends Component<GuardProps, { readonly failedWith: unknown }> {
  override state = { failedWith: null as unknown };
  static getDerivedStateFromError(error: unknown) {
    return { failedWith: error };
  }
  override componentDidCatch(error: unknown, info: ErrorInfo) {
    console.error(`The block ${this.props.blockId} could not be drawn.`, error, info.componentStack);
  }
  override componentDidUpdate(before: GuardProps) {
    if (before.inputs !== this.props.inputs && this.state.failedWith !== null)
      this.setState({ failedWith: null });
  }
  override render() {
    if (this.state.failedWith === null) return this.props.children;
    return (
      <p className="block-problems" role="alert">
        This block could not be drawn. That is a mistake of the program, not of your inputs, which are kept.{" "}
        <button type="button" className="block-link" onClick={() => this.setState({ failedWith: null })}>
          try again
        </button>
      </p>
    );
  }
}
