import { render } from "preact";
import { begin, probe } from "./access/session";
import { whenRefused } from "./api/stream";
import { startWorker } from "./me/pushing";
import { App } from "./shell/App";
import { guardEntrance } from "./shell/entrance";
import { listenToLinks } from "./shell/router";
import { tick } from "./state";
import "./style.css";

whenRefused(probe);
listenToLinks();
guardEntrance();
void begin();
startWorker();
window.setInterval(tick, 1_000);
render(<App />, document.getElementById("app")!);
