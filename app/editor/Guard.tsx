import { Component, type ReactNode } from 'react';

/** Shows a way back where a part of the page fails, in place of a blank page. */
export class Guard extends Component<
  {
    readonly children: ReactNode;
    readonly say: string;
    readonly back: string;
    readonly onBack: () => void;
  },
  { readonly failed: boolean }
> {
  override state = { failed: false };

  static getDerivedStateFromError(): { failed: boolean } {
    return { failed: true };
  }

  override render(): ReactNode {
    const { children, say, back, onBack } = this.props;
    if (!this.state.failed) return children;
    return (
      <main className="start">
        <p role="alert">{say}</p>
        <p className="actions">
          <button
            onClick={() => {
              onBack();
              this.setState({ failed: false });
            }}
          >
            {back}
          </button>
        </p>
      </main>
    );
  }
}
