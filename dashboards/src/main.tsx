import { render } from "preact";
import { listen } from "./api/stream";
import { App } from "./App";
import { tick } from "./state";
import "./style.css";

listen();
window.setInterval(tick, 1_000);
render(<App />, document.getElementById("app")!);
