(function () {
  "use strict";
  var doc = document, root = doc.documentElement;
  function $(id) { return doc.getElementById(id); }
  function all(sel, from) { return Array.prototype.slice.call((from || doc).querySelectorAll(sel)); }
  function read(id) { return JSON.parse($(id).textContent); }
  root.classList.add("js");
  var D = read("data"), L = read("live"), NONE = "–";

  // ---- series: places in the list of moments as differences, values in SI
  var S = Object.create(null);
  Object.keys(D.series).forEach(function (key) {
    var s = D.series[key], at = 0;
    S[key] = { t: s.i.map(function (d) { at += d; return D.t[at]; }), v: s.v, c: s.c };
  });
  function value(key, t) {
    var s = S[key];
    if (!s || !s.t.length) return NaN;
    var lo = 0, hi = s.t.length;
    while (lo < hi) { var mid = (lo + hi) >> 1; if (s.t[mid] > t) hi = mid; else lo = mid + 1; }
    function num(i) { return s.v[i] === null ? NaN : s.v[i]; }
    if (lo === 0) return num(0);
    if (lo === s.t.length || s.t[lo - 1] === t) return num(lo - 1);
    return num(lo - 1) + (num(lo) - num(lo - 1)) * (t - s.t[lo - 1]) / (s.t[lo] - s.t[lo - 1]);
  }

  // ---- words
  function sup(n) { return String(n).replace(/./g, function (c) { return c === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹".charAt(+c); }); }
  function digits(x, n) {
    if (!isFinite(x)) return NONE;
    if (x === 0) return "0";
    var a = Math.abs(x);
    if (a >= 1e7 || a < 1e-4) { var p = x.toExponential(n - 1).split("e"); return p[0].replace("-", "−") + "·10" + sup(+p[1]); }
    var e = +x.toExponential(n - 1).split("e")[1];
    return x.toFixed(Math.max(n - 1 - e, 0)).replace("-", "−");
  }
  function text(si, u) {
    var x = si * u.k;
    if (!isFinite(x)) return NONE;
    if (u.dec < 0) return Math.abs(x) < 1e-9 ? "0" : digits(x, 3);
    if (x === 0) return "0";
    if (Math.abs(x) < 0.5 * Math.pow(10, -u.dec)) x = 0;
    return Math.abs(x) >= 1e7 ? digits(x, 6) : x.toFixed(u.dec).replace("-", "−");
  }
  function withUnit(si, u) { var s = text(si, u); return s === NONE ? s : s + "\u00a0" + u.name; }
  function unit(key) { return D.units[key.split("/")[0]] || { name: "", k: 1, dec: -1 }; }
  function two(n) { return (n < 10 ? "0" : "") + n; }
  function span(s) {
    if (s < 60 && s !== 0) return digits(s, 3) + " s";
    var m = Math.floor(s / 60 + 1e-9), out = [];
    if (m >= 1440) out.push(Math.floor(m / 1440) + " d");
    if (m % 1440 >= 60) out.push(Math.floor(m % 1440 / 60) + " h");
    if (m % 60 || !out.length) out.push(m % 60 + " min");
    if (D.end < 600 && Math.floor(s) % 60) out.push(Math.floor(s) % 60 + " s");
    return out.join(" ");
  }
  function clock(t) {
    if (D.start === null) return span(t);
    var d = new Date(D.start + Math.floor(t * 1000 + 1e-6)), days = Math.floor((D.start + t * 1000) / 864e5) - Math.floor(D.start / 864e5);
    var s = two(d.getUTCHours()) + ":" + two(d.getUTCMinutes());
    if (D.end < 3600) s += ":" + two(d.getUTCSeconds());
    if (D.end < 10) s += "." + ("00" + d.getUTCMilliseconds()).slice(-3);
    return (days ? (days > 0 ? "+" : "") + days + "d " : "") + s;
  }

  // ---- the plant at a moment
  var now = 0, playing = 0, last = 0;
  function set(el, name, v) { if (el) el.setAttribute(name, v); }
  function put(el, s) { if (el && el.textContent !== s) el.textContent = s; }
  function draw() {
    L.vessels.forEach(function (v) {
      var h = value(v.key, now);
      if (!isFinite(h)) return;
      var y = Math.min(Math.max(h, 0), v.height) * v.scale, el = $(v.id + "-liquid");
      set(el, "y", v.bottom - y); set(el, "height", y);
      set($(v.id + "-surface"), "y1", v.bottom - y); set($(v.id + "-surface"), "y2", v.bottom - y);
      put($(v.id + "-text"), withUnit(h, D.units.level));
      $(v.id).classList.toggle("over", v.rim !== null && h > v.rim);
      if (S[v.gas]) put($(v.id + "-gas"), withUnit(value(v.gas, now), D.units.gas));
    });
    L.lines.forEach(function (l) {
      var q = value(l.key, now), f = $(l.id + "-flow"), a = $(l.id + "-arrow"), r = isFinite(q) && l.peak > 0 ? Math.abs(q) / biggest : 0;
      var on = isFinite(q) && l.peak > 0 && Math.abs(q) > 1e-4 * l.peak;
      f.style.visibility = on ? "visible" : "hidden";
      f.style.strokeWidth = (2.4 + 4.2 * Math.sqrt(r)).toFixed(2) + "px";
      if (a) {
        a.style.visibility = on ? "visible" : "hidden";
        a.setAttribute("transform", "scale(" + ((q < 0 ? -1 : 1) * (0.75 + 0.75 * Math.sqrt(r))).toFixed(3) + ")");
      }
    });
    L.parts.forEach(function (p) {
      var x = S[p.key] ? value(p.key, now) : p.first, g = $(p.id);
      if (!g) return;
      g.classList.toggle("open", x > 0 && x < 1); g.classList.toggle("full", x >= 1);
      put($(p.id + "-text"), p.pump ? (x > 0 ? "runs" : "off") : x <= 0 ? "shut" : x >= 1 ? "open" : digits(100 * x, x < 0.1 ? 2 : 3).replace(/\.0+$/, "") + " %");
    });
    L.waters.forEach(function (w) {
      var rows = w.rows, z = rows[0][1], i = 0;
      while (i < rows.length && rows[i][0] <= now) { z = rows[i][1]; i++; }
      if (i > 0 && i < rows.length) z += (rows[i][1] - z) * (now - rows[i - 1][0]) / (rows[i][0] - rows[i - 1][0]);
      var y = w.top + (w.datum - z) * w.scale, el = $(w.id + "-liquid");
      set(el, "y", y); set(el, "height", Math.max(w.foot - y, 1));
      set($(w.id + "-surface"), "transform", "translate(0 " + (y - w.first) + ")");
    });
    if ($("readings").open) all("#readings [data-key]").forEach(function (td) { if (S[td.dataset.key]) put(td, withUnit(value(td.dataset.key, now), unit(td.dataset.key))); });
    put($("now"), clock(now)); put($("reading-time"), clock(now));
    var sl = $("slider");
    sl.value = D.end > 0 ? Math.round(2000 * now / D.end) : 0;
    sl.setAttribute("aria-valuetext", clock(now));
    put($("event"), past());
    cursors();
  }
  var biggest = L.lines.reduce(function (m, l) { return Math.max(m, l.peak || 0); }, 0) || 1;
  function past() {
    var e = null;
    D.events.forEach(function (x) { if (x.t <= now + 1e-9 * D.end) e = x; });
    return e ? clock(e.t) + "  " + e.says : "";
  }
  function go(t, say) {
    now = Math.min(Math.max(t, 0), D.end); draw();
    if (say) put($("status"), clock(now) + ", " + past());
  }
  function hop(dir) {
    var hair = 1e-9 * D.end, to = dir > 0 ? D.end : 0;
    D.events.forEach(function (e) {
      if (dir > 0 && e.t > now + hair && e.t < to) to = e.t;
      if (dir < 0 && e.t < now - hair && e.t > to) to = e.t;
    });
    go(to, true);
  }
  function play(on) {
    playing = on ? 1 : 0;
    $("play").classList.toggle("on", !!on);
    $("play").setAttribute("aria-pressed", on ? "true" : "false"); $("play").setAttribute("aria-label", on ? "Pause" : "Play");
    if (on) { if (now >= D.end) go(0); last = 0; requestAnimationFrame(frame); }
  }
  function frame(ms) {
    if (!playing) return;
    if (last) go(now + (ms - last) / 1000 * D.end / +$("speed").value);
    last = ms;
    if (now >= D.end) play(false); else requestAnimationFrame(frame);
  }

  // ---- the time axis: one window for strip and charts
  var zoom = [0, 1], charts = [], busy = false, SHORT = D.end < 10, END = D.end > 0 ? D.end : 1;
  function x(t) { return SHORT ? t : (D.start || 0) + t * 1000; }
  function back(v) { return SHORT ? v : (v - (D.start || 0)) / 1000; }
  function zoomTo(a, b) {
    var w = Math.min(Math.max(b - a, 1e-4), 1);
    a = Math.min(Math.max(a, 0), 1 - w);
    zoom = [a, a + w]; busy = true;
    charts.forEach(function (c) { c.dispatchAction({ type: "dataZoom", start: 100 * a, end: 100 * (a + w) }); });
    busy = false; strip(); cursors(); charts.forEach(ends);
  }
  function scaleBy(f) { var c = END > 0 ? now / END : 0.5, w = (zoom[1] - zoom[0]) * f; zoomTo(c - w / 2, c + w / 2); }
  function strip() {
    var a = zoom[0], w = zoom[1] - a;
    all(".lane-svg").forEach(function (s) { s.setAttribute("viewBox", 1000 * a + " 0 " + 1000 * w + " 22"); });
    all(".tick").forEach(function (b) { var f = (b.dataset.share - a) / w; b.style.left = 100 * f + "%"; b.hidden = f < -0.001 || f > 1.001; });
    all("#strip-axis > span").forEach(function (s, i) { put(s, clock((a + w * i / 4) * D.end)); });
  }
  function cursors() {
    var c = $("strip-cursor"), f = (now / END - zoom[0]) / (zoom[1] - zoom[0]);
    if (c) {
      c.style.display = f < 0 || f > 1 ? "none" : "block"; c.style.left = 100 * f + "%";
      c.style.setProperty("--h", c.closest(".lanes").offsetHeight - 28 + "px");
    }
    charts.forEach(function (ch) {
      var px = ch.convertToPixel({ xAxisIndex: 0 }, x(now)), el = ch.cursorEl, g = ch.gridBox;
      var ok = isFinite(px) && px >= g[0] - 1 && px <= ch.getWidth() - g[1] + 1;
      el.style.display = ok ? "block" : "none";
      if (ok) { el.style.left = px - 1 + "px"; el.style.top = g[2] + "px"; el.style.height = ch.getHeight() - g[2] - g[3] + "px"; }
    });
  }

  // ---- charts: options from the page, data and looks from here
  var DASH = ["solid", [9, 4], [2, 3], [10, 3, 2, 3], [5, 2], [14, 3, 2, 3, 2, 3]];
  var LIGHT = ["#0b5f8a", "#b4490a", "#00714f", "#93366f", "#7a5c00", "#3d4f9f"], DARK = ["#7cc4ee", "#f2a065", "#63d0a5", "#e79ac6", "#e3c75a", "#a9b8f5"];
  function dark() { return !printing && matchMedia("(prefers-color-scheme: dark)").matches; }
  var printing = false;
  var PAPER = { "--ink": "#000", "--soft": "#333", "--hair": "#bbb", "--paper": "#fff", "--sheet": "#fff" };
  function ink(name) { return printing && PAPER[name] || getComputedStyle(root).getPropertyValue(name).trim(); }
  function label(v) {
    if (SHORT) return digits(v, 3);
    var t = back(v);
    if (D.start === null) return span(Math.max(t, 0));
    var d = new Date(v), h = d.getUTCHours(), m = d.getUTCMinutes(), s = d.getUTCSeconds();
    if (!h && !m && !s) return d.getUTCDate() + " " + "JanFebMarAprMayJunJulAugSepOctNovDec".substr(3 * d.getUTCMonth(), 3) + (D.end > 3e7 ? " " + d.getUTCFullYear() : "");
    return two(h) + ":" + two(m) + (s ? ":" + two(s) : "");
  }
  function tip(u) {
    return function (ps) {
      var box = doc.createElement("div"), head = doc.createElement("p"), table = doc.createElement("table"), t = back(ps[0].axisValue), seen = Object.create(null);
      box.className = "tip"; head.textContent = clock(Math.min(Math.max(t, 0), D.end)); box.appendChild(head); box.appendChild(table);
      ps.forEach(function (p) {
        if (!S[p.seriesId] || seen[p.seriesId]) return;
        seen[p.seriesId] = 1;
        var tr = table.insertRow(), th = doc.createElement("th"); th.textContent = p.seriesName; th.style.color = p.color; tr.appendChild(th);
        tr.insertCell().textContent = withUnit(value(p.seriesId, t), u);
      });
      return box;
    };
  }
  // the lower edge of a band, or what lies over it
  var bands = null;
  function band(s, color, k) {
    var b = bands = bands || read("result").series_band || { time_s: [], level_m: {} }, l = b.level_m[s.name], up = /^bandup/.test(s.id);
    if (l) s.data = b.time_s.map(function (t, i) { return [x(t), +((up ? l.high[i] - l.low[i] : l.low[i]) * k).toPrecision(6)]; });
    s.color = color; s.itemStyle = { color: color }; s.areaStyle.color = color; s.silent = true; s.z = 1; s.symbol = "none"; s.tooltip = { show: false }; s.emphasis = { disabled: true };
  }
  function finish(o, el) {
    var u = D.units[el.dataset.unit], colors = dark() ? DARK : LIGHT, order = Object.create(null), n = 0, narrow = narrowed(el);
    var INK = ink("--ink"), SOFT = ink("--soft"), HAIR = ink("--hair"), font = ink("--sans");
    o.useUTC = true; o.color = colors; o.backgroundColor = "transparent"; o.textStyle = { fontFamily: font, color: INK, fontSize: 12 };
    o.title = { show: false }; o.toolbox = { show: false }; o.animation = false;
    var wide = 0, rows = 1, room = (printing ? 690 : el.clientWidth) - (narrow ? 60 : 180);
    o.legend.data.forEach(function (name) { var w = 46 + Math.min(name.length, 28) * 7; if (wide + w > room) { rows++; wide = 0; } wide += w; });
    o.legend.left = narrow ? 44 : 76; o.legend.textStyle = { color: INK, width: 200, overflow: "truncate" }; o.legend.inactiveColor = SOFT; o.legend.padding = 0; o.legend.lineStyle = { inactiveColor: SOFT };
    var grid = o.grid[0] || o.grid;
    grid.left = narrow ? 44 : 76; grid.right = narrow ? 12 : 104; grid.top = 24 + 20 * rows; grid.bottom = 30;
    o.grid = grid;
    el.names = [];
    el.gridBox = [grid.left, grid.right, grid.top, grid.bottom];
    o.xAxis.forEach(function (a) {
      a.axisLabel = { formatter: label, color: SOFT, hideOverlap: true, showMinLabel: null, showMaxLabel: null }; a.splitLine = { show: false }; a.axisLine = { lineStyle: { color: SOFT }, onZero: false }; a.axisPointer = { label: { show: false }, lineStyle: { color: SOFT } };
    });
    o.yAxis.forEach(function (a) {
      a.axisLabel = { formatter: function (v) { return v === 0 ? "0" : String(+v.toPrecision(6)).replace("-", "−"); }, color: SOFT, showMinLabel: null, showMaxLabel: null }; a.nameTextStyle = { color: SOFT, align: "right", padding: [0, 8, 0, 0] }; a.nameGap = 18; // over the numbers of the steps
      a.splitLine = { lineStyle: { color: HAIR } };
    });
    o.dataZoom = [{ type: "inside", filterMode: "none", zoomOnMouseWheel: "ctrl", moveOnMouseWheel: false, moveOnMouseMove: true, preventDefaultMouseMove: false, start: 100 * zoom[0], end: 100 * zoom[1] }];
    o.tooltip.formatter = tip(u); o.tooltip.confine = true; o.tooltip.backgroundColor = ink("--sheet"); o.tooltip.borderColor = INK; o.tooltip.textStyle = { color: INK }; o.tooltip.transitionDuration = 0; o.tooltip.extraCssText = "border-radius:0;box-shadow:none";
    o.series.forEach(function (s) {
      s.animation = false;
      if (s.id === "steps") { s.markLine && (s.markLine.lineStyle.color = SOFT, s.markLine.label.color = SOFT, s.markLine.silent = true, s.markLine.animation = false); s.data = []; s.tooltip = { show: false }; return; }
      if (!(s.name in order)) order[s.name] = n++;
      var k = order[s.name], color = colors[k % colors.length], d = S[s.id];
      if (/^band(low|up)\//.test(s.id)) { band(s, color, u.k); return; }
      s.color = color; s.itemStyle = { color: color }; s.lineStyle = s.lineStyle || {}; s.lineStyle.color = color; s.emphasis = { disabled: true };
      if (d) {
        s.data = d.t.map(function (t, i) { return [x(t), d.v[i] === null ? null : +(d.v[i] * u.k).toPrecision(9)]; });
        s.lineStyle.type = DASH[k % DASH.length]; s.triggerLineEvent = false;
        s.symbol = "none"; el.names.push({ id: s.id, name: s.name, color: color, k: u.k });
      } else { s.silent = true; s.z = 4; }
      if (s.markLine) { s.markLine.silent = true; s.markLine.animation = false; s.markLine.data.forEach(function (m) { (m.length ? m : [m]).forEach(function (e) { if (e.lineStyle) e.lineStyle.color = color; if (e.label) { e.label.color = INK; e.label.textBorderColor = ink("--paper"); e.label.textBorderWidth = 3; } }); }); }
      if (s.markArea) { s.markArea.silent = true; s.markArea.data.forEach(function (m) { m[0].itemStyle = { color: color, opacity: 0.16 }; }); }
      if (s.markPoint) { s.markPoint.silent = true; s.markPoint.animation = false; delete s.markPoint.symbol; s.markPoint.data.forEach(function (m) { m.itemStyle = { color: color }; if (m.label) { m.label.color = INK; m.label.textBorderColor = ink("--paper"); m.label.textBorderWidth = 3; m.label.distance = 2; } }); }
    });
    return o;
  }
  function chart(el) {
    if (el.chart) return;
    var o = finish(JSON.parse(el.parentNode.querySelector("script.options").textContent), el);
    el.replaceChildren();
    var box = doc.createElement("div"), c;
    box.style.cssText = "position:absolute;inset:0"; el.appendChild(box);
    c = echarts.init(box, null, printing ? { renderer: "svg", width: 690, height: 220 } : { renderer: "svg" });
    c.group = "run"; c.setOption(o); c.gridBox = el.gridBox; c.names = narrowed(el) ? [] : el.names.map(function (n) { var d = doc.createElement("div"); d.className = "endname"; d.textContent = n.name; d.style.color = n.color; el.appendChild(d); n.el = d; return n; });
    c.cursorEl = doc.createElement("div"); c.cursorEl.className = "cursor"; el.appendChild(c.cursorEl);
    c.getZr().on("click", function (e) { if (c.containPixel("grid", [e.offsetX, e.offsetY])) go(back(c.convertFromPixel({ xAxisIndex: 0 }, e.offsetX)), true); });
    c.on("legendselectchanged", function () { ends(c); });
    c.on("datazoom", function () {
      if (busy) return;
      var z = c.getOption().dataZoom[0];
      zoom = [z.start / 100, z.end / 100]; strip(); cursors(); charts.forEach(ends);
    });
    el.chart = c; charts.push(c); cursors(); ends(c);
  }
  // names at the right end of the curves, pushed apart where they meet
  function narrowed(el) { return !printing && el.clientWidth < 560; }
  function ends(c) {
    var off = (c.getOption().legend[0].selected) || {}, t = zoom[1] * D.end, from = c.gridBox[2] - 7, to = c.getHeight() - c.gridBox[3] - 7;
    var on = c.names.filter(function (n) {
      var v = value(n.id, t), y = c.convertToPixel({ yAxisIndex: 0 }, (isFinite(v) ? v : 0) * n.k);
      n.y = Math.min(Math.max(y - 7, from), to); n.el.hidden = off[n.name] === false;
      return !n.el.hidden;
    }).sort(function (a, b) { return a.y - b.y; });
    for (var i = 1; i < on.length; i++) on[i].y = Math.max(on[i].y, on[i - 1].y + 14);
    for (i = on.length - 1; i >= 0; i--) on[i].y = Math.min(on[i].y, (i + 1 < on.length ? on[i + 1].y - 14 : to));
    on.forEach(function (n) { n.el.style.top = n.y + "px"; });
  }
  function redraw() {
    all(".plot").forEach(function (el) { if (el.chart) { charts.splice(charts.indexOf(el.chart), 1); el.chart.dispose(); el.chart = null; chart(el); } });
  }
  echarts.connect("run");
  var plots = all(".plot");
  if (window.IntersectionObserver) {
    var seen = new IntersectionObserver(function (es) { es.forEach(function (e) { if (e.isIntersecting) { seen.unobserve(e.target); chart(e.target); } }); }, { rootMargin: "300px" });
    plots.forEach(function (el) { seen.observe(el); });
  } else plots.forEach(chart);

  // ---- print: everything drawn, the whole run, as wide as the paper
  function before() {
    if (printing) return;
    printing = true; play(false); zoomTo(0, 1); plots.forEach(chart); redraw();
  }
  function after() { printing = false; redraw(); cursors(); }
  addEventListener("beforeprint", before); addEventListener("afterprint", after);
  matchMedia("(prefers-color-scheme: dark)").addEventListener("change", redraw);
  var late = 0, width = innerWidth;
  addEventListener("resize", function () { if (printing || innerWidth === width) return; width = innerWidth; clearTimeout(late); late = setTimeout(redraw, 120); });

  // ---- saving what the page carries
  function grid() {
    var keys = Object.keys(S).filter(function (k) { return S[k].c; });
    return { keys: keys, rows: D.t.map(function (t, i) { var first = i + 1 < D.t.length && D.t[i + 1] === t; return keys.map(function (k) { return at(S[k], t, first); }); }) };
  }
  function at(s, t, first) { // at a step the first of two rows holds what was before it
    for (var i = 0; first && i < s.t.length && s.t[i] <= t; i++) if (s.t[i] === t) return s.v[i];
    var v = value(keyOf(s), t);
    return isFinite(v) ? +v.toPrecision(6) : null;
  }
  function keyOf(s) { if (!s.key) Object.keys(S).forEach(function (k) { S[k].key = k; }); return s.key; }
  function iso(t) { return D.start === null ? "" : new Date(D.start + Math.round(t * 1000)).toISOString().replace(/(\.000)?Z$/, ""); }
  function save(name, type, body) {
    var a = doc.createElement("a"), url = URL.createObjectURL(new Blob([body], { type: type }));
    a.href = url; a.download = name; doc.body.appendChild(a); a.click(); a.remove(); setTimeout(function () { URL.revokeObjectURL(url); }, 1000);
  }
  function base() { return (read("result").scenario.file || "run").replace(/\.[^.]*$/, "").replace(/[^\w.-]+/g, "_") || "run"; }
  function csv() {
    var g = grid(), out = [["time_s", "clock"].concat(g.keys.map(function (k) { return S[k].c; })).join(",")];
    D.t.forEach(function (t, i) { out.push([t, iso(t)].concat(g.rows[i].map(function (v) { return v === null ? "" : v; })).join(",")); });
    return out.join("\n") + "\n";
  }
  function json() {
    var r = read("result"), g = grid(), s = { time_s: D.t };
    var names = { level: "level_m", volume: "volume_m3", gas: "gas_pa_g", flow: "flow_m3_s", opening: "opening", running: "running", head: "tee_head_m", crest: "crest_m" };
    g.keys.forEach(function (k, n) { var what = k.slice(0, k.indexOf("/")), m = names[what]; (s[m] = s[m] || {})[k.slice(what.length + 1)] = g.rows.map(function (row) { return row[n]; }); });
    r.series = s; r.series_thinned = D.thinned;
    return JSON.stringify(r, null, 1);
  }
  $("save-csv").addEventListener("click", function () { save(base() + ".csv", "text/csv", csv()); });
  $("save-json").addEventListener("click", function () { save(base() + ".json", "application/json", json()); });

  // ---- controls
  $("play").addEventListener("click", function () { play(!playing); });
  $("prev").addEventListener("click", function () { play(false); hop(-1); });
  $("next").addEventListener("click", function () { play(false); hop(1); });
  $("slider").addEventListener("input", function () { play(false); go(this.value / 2000 * D.end); });
  $("zoomin").addEventListener("click", function () { scaleBy(0.5); });
  $("zoomout").addEventListener("click", function () { scaleBy(2); });
  $("zoomreset").addEventListener("click", function () { zoomTo(0, 1); });
  $("readings").addEventListener("toggle", draw);
  doc.addEventListener("click", function (e) {
    var el = e.target.closest("[data-t]");
    if (!el) return;
    play(false); go(+el.dataset.t, true);
    if (el.closest(".flags")) $("plant").scrollIntoView({ block: "start" });
  });
  function keys(e) {
    if (e.altKey || e.ctrlKey || e.metaKey || /^(INPUT|SELECT|BUTTON|SUMMARY|A)$/.test(e.target.tagName) && e.target.id !== "slider") return;
    var step = D.end / 200, used = true;
    if (e.key === " ") play(!playing);
    else if (e.key === "ArrowRight") { play(false); e.shiftKey ? hop(1) : go(now + step); }
    else if (e.key === "ArrowLeft") { play(false); e.shiftKey ? hop(-1) : go(now - step); }
    else if (e.key === "Home") go(0, true);
    else if (e.key === "End") go(D.end, true);
    else if (e.key === "+" || e.key === "=") scaleBy(0.5);
    else if (e.key === "-") scaleBy(2);
    else if (e.key === "0") zoomTo(0, 1);
    else used = false;
    if (used) e.preventDefault();
  }
  $("elevation").addEventListener("keydown", keys); $("playbar").addEventListener("keydown", keys);

  // A drawing wider than the window opens where the vessels stand.
  function showVessels() {
    var e = $("elevation"), frame = e.getBoundingClientRect(), lo = Infinity, hi = -Infinity;
    if (e.scrollWidth <= e.clientWidth) return;
    L.vessels.forEach(function (v) {
      var r = $(v.id).getBoundingClientRect();
      lo = Math.min(lo, r.left - frame.left + e.scrollLeft); hi = Math.max(hi, r.right - frame.left + e.scrollLeft);
    });
    if (hi > lo) e.scrollLeft = hi - lo < e.clientWidth ? (lo + hi - e.clientWidth) / 2 : lo - 16;
  }

  strip(); draw(); showVessels();
  window.headfall = { go: go, value: value, zoom: function () { return zoom; }, charts: charts, csv: csv, json: json, now: function () { return now; }, all: function () { plots.forEach(chart); } };
})();
