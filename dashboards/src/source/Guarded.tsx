import { Component, type ComponentChildren } from "preact";

/** A part of the page that can fail by itself: the rest, hazards above all, stays. */
export class Guarded extends Component<{ name: string; children: ComponentChildren }, { hasFailed: boolean }> {
  override state = { hasFailed: false };

  override componentDidCatch(): void {
    this.setState({ hasFailed: true });
  }

  override render() {
    return this.state.hasFailed ? (
      <section class="panel">
        <h2>{this.props.name}</h2>
        <p class="abnormal">This part cannot be shown. The rest of the page is not affected; reload it to try again.</p>
      </section>
    ) : (
      this.props.children
    );
  }
}
