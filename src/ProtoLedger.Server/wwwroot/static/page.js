// Times in the reader's zone (UTC stays at hand in the title), the search key, and the focus on a refusal.
'use strict';
for (const element of document.querySelectorAll('time[datetime]')) {
  const at = new Date(element.dateTime);
  if (Number.isNaN(at.valueOf())) continue;
  element.title = element.textContent;
  const shown = { year: 'numeric', month: '2-digit', day: '2-digit', ...(element.hasAttribute('data-day') ? {} : { hour: '2-digit', minute: '2-digit', timeZoneName: 'short' }) };
  element.textContent = new Intl.DateTimeFormat('sv-SE', shown).format(at);
}
document.addEventListener('keydown', event => {
  const find = document.getElementById('find');
  if (event.key === '/' && find && !event.ctrlKey && !event.metaKey && !event.target.closest('input, textarea, select')) {
    event.preventDefault();
    find.focus();
  }
});
document.querySelector('[data-focus]')?.focus();
