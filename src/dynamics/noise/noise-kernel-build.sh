#!/bin/sh
# Builds noise-kernel.c into noise-kernel-bytes.ts. Needs clang 14 or later with its wasm linker (Debian: clang, lld).
# Run from any folder: sh src/dynamics/noise/noise-kernel-build.sh
set -eu
here=$(dirname "$0")
built=$(mktemp)
trap 'rm -f "$built"' EXIT
clang --target=wasm32 -O3 -msimd128 -mbulk-memory -ffp-contract=off -nostdlib -Wl,--no-entry -Wl,--strip-all \
  -Wl,--export=state_place -Wl,--export=values_place -Wl,--export=prepare -Wl,--export=normals \
  -Wl,--export=factors -o "$built" "$here/noise-kernel.c"
{
  echo '/** noise-kernel.c as WebAssembly, base64; made by noise-kernel-build.sh. */'
  echo 'export const noiseKernelBytes: string = ['
  base64 -w 100 "$built" | sed 's/.*/  "&",/'
  echo '].join("");'
} > "$here/noise-kernel-bytes.ts"
