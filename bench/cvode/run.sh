#!/usr/bin/env bash
# Compares package integrate with SUNDIALS CVODE at equal achieved error, where the Debian package libsundials-dev and a C
# compiler are present; says so and does nothing where they are not. From anywhere: bash bench/cvode/run.sh
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
build=$(mktemp -d)
trap 'rm -rf "$build"' EXIT
if ! ${CC:-cc} -O2 -std=c11 -o "$build/cvode" bench/cvode/solver/cvode.c -lsundials_cvode -lsundials_nvecserial -lm 2>"$build/log"; then
	echo "no comparison: bench/cvode/solver/cvode.c does not build here (it needs a C compiler and libsundials-dev)"
	exit 0
fi
go run ./bench/cvode -solver "$build/cvode" "$@"
