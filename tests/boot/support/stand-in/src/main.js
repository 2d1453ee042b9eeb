document.title = 'Stand-in runs';
