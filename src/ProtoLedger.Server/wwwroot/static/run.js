// Follows a run; where the browser cannot, loading the page again shows the same.
'use strict';
(() => {
  const box = document.querySelector('[data-run]');
  const bar = box?.querySelector('progress');
  if (!box || !window.EventSource) return;
  const events = new EventSource(`/api/v1/runs/${box.dataset.run}/events`);
  events.addEventListener('progress', event => {
    const { total, done } = JSON.parse(event.data);
    if (bar && total > 0) { bar.max = total; bar.value = done; }
  });
  events.addEventListener('ended', () => { events.close(); location.reload(); });
})();
