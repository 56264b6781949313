// The app's service worker: shows push messages and opens the page that they are about. It keeps no copy of any page: what is shown of a hazard
// must come from the service itself, never from a cache.
"use strict";

self.addEventListener("install", () => self.skipWaiting());
self.addEventListener("activate", (event) => event.waitUntil(self.clients.claim()));

self.addEventListener("push", (event) => {
  let message = {};
  try {
    message = event.data.json();
  } catch {
    // A message that cannot be read is still a message: somebody must look.
  }
  event.waitUntil(
    self.registration.showNotification(typeof message.title === "string" ? `LabWatch: ${message.title}` : "LabWatch", {
      body: typeof message.body === "string" ? message.body : "There is news. Open LabWatch to see it.",
      tag: typeof message.tag === "string" ? message.tag : "labwatch",
      renotify: true,
      requireInteraction: message.isUrgent === true,
      icon: "/icon-192.png",
      data: { address: typeof message.address === "string" && message.address.startsWith("/") ? message.address : "/" },
    }),
  );
});

self.addEventListener("notificationclick", (event) => {
  event.notification.close();
  event.waitUntil(open(event.notification.data?.address ?? "/"));
});

async function open(address) {
  const target = new URL(address, self.location.origin);
  if (target.origin !== self.location.origin) {
    return;
  }
  const windows = await self.clients.matchAll({ type: "window", includeUncontrolled: true });
  for (const one of windows) {
    if ("navigate" in one) {
      await one.focus();
      await one.navigate(target.href);
      return;
    }
  }
  await self.clients.openWindow(target.href);
}
