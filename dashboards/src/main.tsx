import { render } from "preact";
import { listen } from "./api/stream";
import { App } from "./shell/App";
import { listenToLinks } from "./shell/router";
import { tick } from "./state";
import "./style.css";

listen();
listenToLinks();
window.setInterval(tick, 1_000);
render(<App />, document.getElementById("app")!);
