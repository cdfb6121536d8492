// While a series is edited: its prediction before and after, and the inversion time that nulls a tissue. The numbers come from the server's engine.
'use strict';
(() => {
  const live = document.getElementById('live');
  let timer = 0;
  let running = null;

  const value = (text, like) => Array.isArray(like) ? text.split(',').map(item => value(item.trim(), like[0])) : typeof like === 'number' ? Number(text) : text;

  function seriesOf(section, edited) {
    const series = JSON.parse(section.dataset.series);
    if (!edited) return series;
    for (const input of section.querySelectorAll('[data-pointer]')) {
      if (input.value === input.dataset.stored) continue;
      const keys = input.dataset.pointer.split('/').slice(3);
      let place = series;
      for (const key of keys.slice(0, -1)) place = place?.[key];
      if (place) place[keys.at(-1)] = value(input.value, place[keys.at(-1)]);
    }
    return series;
  }

  // What the form's limits already tell; the server checks everything again.
  function check(input, field) {
    const { low, high } = input.dataset;
    if (input.inputMode !== 'decimal') return true;
    const numbers = input.value.split(',').map(item => item.trim() === '' ? NaN : Number(item));
    const wrong = numbers.some(Number.isNaN) ? 'Not a number yet.'
      : low !== undefined && low !== '' && numbers.some(number => number < Number(low)) ? `At least ${low}.`
      : high !== undefined && high !== '' && numbers.some(number => number > Number(high)) ? `At most ${high}.` : '';
    field.classList.toggle('invalid', wrong !== '');
    field.querySelector('.error')?.remove();
    if (wrong) {
      const text = document.createElement('p');
      text.className = 'error';
      text.id = input.id + '-error';
      text.textContent = wrong;
      field.append(text);
      input.setAttribute('aria-describedby', text.id);
    }
    return wrong === '';
  }

  async function predict(series, section, signal) {
    const answer = await fetch('/api/v1/predictions', {
      method: 'POST',
      signal,
      headers: { 'Content-Type': 'application/json', 'X-Protoledger-Page': '1' },
      body: JSON.stringify({
        series: { preparations: series.preparations ?? [], readout: series.readout },
        tissues: section.dataset.tissues.split(' ').filter(Boolean),
        pulses: 'ideal',
        fieldStrength: Number(section.dataset.field),
      }),
    });
    const body = await answer.json();
    if (!answer.ok) throw new Error(body.errors?.map(error => `${error.pointer}: ${error.detail}`).join(' ') ?? body.detail);
    return new Map(body.results.map(result => [result.tissue, result]));
  }

  // The signed signal crosses zero once between a short and a long inversion time.
  async function nullTime(series, section, tissue, signal) {
    const at = async time => {
      const tried = structuredClone(series);
      tried.preparations[0].InversionTime = time;
      return (await predict(tried, section, signal)).get(tissue).signed;
    };
    let low = 20, high = Math.max(40, series.readout.RepetitionTime * 0.6);
    let atLow = await at(low);
    if (atLow > 0) return null;
    if (await at(high) < 0) return null;
    for (let i = 0; i < 14 && high - low > 1; i++) {
      const middle = (low + high) / 2;
      if (await at(middle) < 0) low = middle; else high = middle;
    }
    return Math.round((low + high) / 2);
  }

  function show(section, before, after) {
    const brightest = Math.max(...[...before.values()].map(result => result.magnitude), ...[...after.values()].map(result => result.magnitude));
    const table = document.createElement('table');
    table.className = 'dense';
    table.innerHTML = '<thead><tr><th>Tissue</th><th class="number">Before</th><th class="number">After</th></tr></thead><tbody></tbody>';
    for (const [tissue, result] of after) {
      const row = table.tBodies[0].insertRow();
      row.insertCell().textContent = tissue.replaceAll('-', ' ');
      for (const number of [before.get(tissue)?.magnitude, result.magnitude]) {
        const cell = row.insertCell();
        cell.className = 'number';
        cell.textContent = number === undefined ? '' : (number / brightest).toFixed(2);
      }
    }
    const heading = document.createElement('h3');
    heading.textContent = section.querySelector('h2').textContent + ', brightness (brightest = 1)';
    live.replaceChildren(heading, table);
  }

  async function offerNull(section, series, signal) {
    const input = section.querySelector('[data-pointer$="/preparations/0/InversionTime"]');
    if (!input || series.preparations?.[0]?.kind !== 'inversion') return;
    const dark = ['csf', 'synovial-fluid', 'subcutaneous-fat', 'yellow-marrow'].find(name => section.dataset.tissues.split(' ').includes(name));
    if (!dark) return;
    const time = await nullTime(series, section, dark, signal);
    if (time === null || String(time) === input.value) return;
    const button = document.createElement('button');
    button.type = 'button';
    button.textContent = `Set the inversion time to ${time} ms, which nulls ${dark.replaceAll('-', ' ')}`;
    button.addEventListener('click', () => { input.value = String(time); input.dispatchEvent(new Event('input', { bubbles: true })); input.focus(); });
    live.append(button);
  }

  async function refresh(section) {
    running?.abort();
    running = new AbortController();
    const { signal } = running;
    live.hidden = false;
    live.setAttribute('aria-busy', 'true');
    try {
      const edited = seriesOf(section, true);
      const [before, after] = await Promise.all([predict(seriesOf(section, false), section, signal), predict(edited, section, signal)]);
      show(section, before, after);
      await offerNull(section, edited, signal);
    } catch (error) {
      if (error.name === 'AbortError') return;
      live.textContent = error.message;
    }
    live.removeAttribute('aria-busy');
  }

  document.getElementById('proposal').addEventListener('input', event => {
    const input = event.target.closest('[data-pointer]');
    if (!input) return;
    const field = input.closest('.field');
    field.classList.toggle('changed', input.value !== input.dataset.stored);
    if (!check(input, field)) return;
    const section = input.closest('section[data-series]');
    if (!section?.dataset.series || !section.dataset.tissues) return;
    clearTimeout(timer);
    timer = setTimeout(() => refresh(section), 40);
  });
})();
