import { Component, type ErrorInfo, type ReactNode } from "react";
import { Button } from "../ui/button.tsx";

interface Props {
  readonly children: ReactNode;
  /** A change of this (the address) gives the page another chance. */
  readonly resetKey: string;
}
interface State {
  readonly error: Error | null;
}

/** A page that fails says so in its own place; the rest of the site stays. */
export class PageBoundary extends Component<Props, State> {
  override state: State = { error: null };

  static getDerivedStateFromError(error: Error): State {
    return { error };
  }

  override componentDidCatch(error: Error, info: ErrorInfo): void {
    console.error("A page failed while it was drawn.", error, info.componentStack);
  }

  override componentDidUpdate(before: Props): void {
    if (before.resetKey !== this.props.resetKey && this.state.error) this.setState({ error: null });
  }

  override render(): ReactNode {
    if (!this.state.error) return this.props.children;
    return (
      <main id="main" tabIndex={-1} className="mx-auto max-w-(--measure) px-4 py-16">
        <title>Page failed · Subleading</title>
        <h1 className="font-prose text-title leading-tight">This page could not be drawn</h1>
        <p className="mt-4 text-lead">
          The fault is in the page, not in your notebook: what was saved is safe. Reload the page; if it fails
          again, the words below help whoever looks after this server.
        </p>
        <p className="mt-4 border-l-2 border-hairline pl-3 font-notation text-small text-ink-2">
          {this.state.error.message}
        </p>
        <Button
          look="main"
          className="mt-6"
          onClick={() => {
            window.location.reload();
          }}
        >
          Reload the page
        </Button>
      </main>
    );
  }
}
