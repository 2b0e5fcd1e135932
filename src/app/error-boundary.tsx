import { Component, type ReactNode } from 'react';
import { appText, wording } from '#shared/text/en/app.ts';
import { Button } from '../ui/button.tsx';

interface Props {
  /** Changes when the reader goes elsewhere: the boundary tries again. */
  place: string;
  children: ReactNode;
}

/** A part that breaks takes only itself down, says so, and is tried again on the next page. */
export class ErrorBoundary extends Component<Props, { broken: boolean; place: string }> {
  override state = { broken: false, place: this.props.place };
  static getDerivedStateFromError = () => ({ broken: true });
  static getDerivedStateFromProps = (props: Props, state: { broken: boolean; place: string }) =>
    props.place === state.place ? null : { broken: false, place: props.place };

  override render(): ReactNode {
    if (!this.state.broken) return this.props.children;
    return (
      <section role="alert" className="mx-auto max-w-xl px-6 py-16">
        <h1 className="type-title text-3xl">{appText.broken}</h1>
        <p className="mt-3 text-dim">{appText.brokenMore}</p>
        <Button kind="primary" className="mt-6" onClick={() => window.location.reload()}>
          {wording.retry}
        </Button>
      </section>
    );
  }
}
