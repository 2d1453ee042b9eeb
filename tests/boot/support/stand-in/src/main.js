globalThis.document.title = 'Stand-in runs';
