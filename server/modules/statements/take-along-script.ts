/**
 * What the page runs: SHA-256 over the carried data and over the words it shows (white space apart), compared with
 * what was noted when it was made. It asks nothing of anybody; a browser opens a file without the means to do more.
 * SHA-256 after FIPS 180-4.
 */
export const TAKE_ALONG_SCRIPT = `'use strict';
(function () {
  function constants(count, power) {
    var found = [];
    for (var candidate = 2; found.length < count; candidate += 1) {
      var isPrime = true;
      for (var divisor = 2; divisor * divisor <= candidate; divisor += 1) if (candidate % divisor === 0) isPrime = false;
      if (isPrime) { var root = Math.pow(candidate, power); found.push(Math.floor((root - Math.floor(root)) * 4294967296)); }
    }
    return found;
  }
  function sha256(text) {
    var k = constants(64, 1 / 3), h = constants(8, 1 / 2);
    var bytes = new TextEncoder().encode(text), length = bytes.length;
    var padded = new Uint8Array(((length + 8 >> 6) + 1) * 64);
    padded.set(bytes);
    padded[length] = 128;
    var view = new DataView(padded.buffer);
    view.setUint32(padded.length - 8, Math.floor(length / 536870912));
    view.setUint32(padded.length - 4, (length << 3) >>> 0);
    var turn = function (x, n) { return (x >>> n) | (x << (32 - n)); };
    var w = new Int32Array(64);
    for (var at = 0; at < padded.length; at += 64) {
      for (var i = 0; i < 64; i += 1) {
        if (i < 16) { w[i] = view.getInt32(at + 4 * i); continue; }
        var s0 = turn(w[i - 15], 7) ^ turn(w[i - 15], 18) ^ (w[i - 15] >>> 3);
        var s1 = turn(w[i - 2], 17) ^ turn(w[i - 2], 19) ^ (w[i - 2] >>> 10);
        w[i] = w[i - 16] + s0 + w[i - 7] + s1;
      }
      var v = h.slice();
      for (var j = 0; j < 64; j += 1) {
        var e1 = turn(v[4], 6) ^ turn(v[4], 11) ^ turn(v[4], 25);
        var one = (v[7] + e1 + ((v[4] & v[5]) ^ (~v[4] & v[6])) + k[j] + w[j]) | 0;
        var e0 = turn(v[0], 2) ^ turn(v[0], 13) ^ turn(v[0], 22);
        var two = (e0 + ((v[0] & v[1]) ^ (v[0] & v[2]) ^ (v[1] & v[2]))) | 0;
        v = [(one + two) | 0, v[0], v[1], v[2], (v[3] + one) | 0, v[4], v[5], v[6]];
      }
      for (var n = 0; n < 8; n += 1) h[n] = (h[n] + v[n]) | 0;
    }
    return h.map(function (word) { return (word >>> 0).toString(16).padStart(8, '0'); }).join('');
  }
  var verdict = document.getElementById('verdict');
  var data = sha256(document.getElementById('chain').textContent) === verdict.dataset.content;
  var words = sha256(document.getElementById('said').textContent.replace(/\\s+/g, '')) === verdict.dataset.said;
  var shown = document.getElementById('sha256').textContent === verdict.dataset.content;
  verdict.className = data && words && shown ? 'holds' : 'broken';
  verdict.textContent = data && words && shown
    ? 'The content of this page matches its hash.'
    : 'The content of this page does not match its hash' + (data ? ': its words were changed.' : ': its data were changed.') + ' Do not rely on it.';
})();
`;
