#!/bin/sh
# Cuts the shipped fonts out of the npm packages. Run from the repository root; see fonts/README.md.
set -e
from=node_modules/@fontsource-variable
to=assets/web/fonts
work=$(mktemp -d)
latin='U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD'

cut() { # package, part, weights, characters
  fonttools varLib.instancer -q "$from/$1/files/$1-$2-wght-normal.woff2" "wght=$3" -o "$work/$1-$2.ttf"
  pyftsubset "$work/$1-$2.ttf" --unicodes="$4" --layout-features='*' --name-IDs='*' --no-hinting --flavor=woff2 --output-file="$to/$1-$2.woff2"
}

cut bricolage-grotesque latin 600:700 "$latin"
cut bricolage-grotesque latin-ext 600:700 '*'
cut atkinson-hyperlegible-next latin 400:700 "$latin"
cut atkinson-hyperlegible-next latin-ext 400:700 '*'
cp "$from/bricolage-grotesque/LICENSE" "$to/bricolage-grotesque-OFL.txt"
cp "$from/atkinson-hyperlegible-next/LICENSE" "$to/atkinson-hyperlegible-next-OFL.txt"
rm -r "$work"
