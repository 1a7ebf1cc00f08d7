// Stands for a style sheet where there is no browser to apply it.
module.exports = {};
