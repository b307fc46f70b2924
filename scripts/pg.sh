#!/usr/bin/env bash
# A PostgreSQL cluster of the project's own, on loopback only.
#
#   pg.sh start     install PostgreSQL when missing, create the cluster, start it, print the owner's URL
#   pg.sh stop      stop it                 pg.sh status   exit 0 when it runs, 3 when not
#   pg.sh url       print the owner's URL   pg.sh destroy  stop it and delete its data
#   pg.sh where     print the directory it lives in
#   pg.sh renew     drop the database and create it empty (only with PG_FAST=1)
#
# Environment:
#   PG_DIR    where the cluster lives (default .data/pg of the project)
#   PG_PORT   first port to try (default 54329; the next free one is taken)
#   PG_DB     database to create (default farlug)
#   PG_FAST   1 = no fsync, for tests; refused for the cluster that keeps people's work
#
# Only the URL goes to standard output. Run as root, the server runs as user "postgres".
# The role in the URL owns the cluster: it is for migrations, never for the api or the worker.
set -euo pipefail
umask 077

root="$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd -P)"
database="${PG_DB:-farlug}"
role=farlug_owner

say() { echo "postgres: $*" >&2; }
die() { say "$*"; exit 1; }
is_root() { [ "$(id -u)" = 0 ]; }

find_binaries() {
  local dir
  while read -r dir; do
    [ -x "$dir/initdb" ] && [ -x "$dir/pg_ctl" ] && [ -x "$dir/psql" ] && { echo "$dir"; return 0; }
  done < <(ls -d /usr/lib/postgresql/*/bin 2>/dev/null | sort -rV; dirname "$(command -v initdb || echo /none/none)")
  return 1
}

install_server() {
  local as_root=()
  if ! is_root; then
    sudo -n true 2>/dev/null || die "no PostgreSQL server here: run  sudo apt-get install postgresql  and start again"
    as_root=(sudo -n)
  fi
  say "installing PostgreSQL from the distribution's packages"
  # No cluster of the distribution's own: it would listen on 5432 and start at boot.
  "${as_root[@]}" sh -c 'umask 022; mkdir -p /etc/postgresql-common
    conf=/etc/postgresql-common/createcluster.conf
    [ -e "$conf" ] || echo "create_main_cluster = false" >"$conf"
    export DEBIAN_FRONTEND=noninteractive
    apt-get install -y -qq --no-install-recommends postgresql ||
      { apt-get update -qq && apt-get install -y -qq --no-install-recommends postgresql; }' >&2 ||
    die "PostgreSQL could not be installed: run  apt-get install postgresql  by hand and read its message"
}

bin="$(find_binaries)" || { install_server; bin="$(find_binaries)" || die "no PostgreSQL server after the installation"; }

default_dir="$root/.data/pg"
server_user="$(id -un)"
as_server() { "$@"; }
if is_root; then
  server_user=postgres
  as_server() { (cd / && runuser -u postgres -- "$@"); }
  # User postgres cannot enter e.g. /root: the data then lives under /var/lib.
  as_server test -x "$root" || default_dir="/var/lib/$(basename "$root")-$(printf %s "$root" | cksum | cut -d' ' -f1)/pg"
fi
dir="${PG_DIR:-$default_dir}"
case "$dir" in /*) ;; *) dir="$PWD/$dir" ;; esac
[ "${PG_FAST:-}" != 1 ] || [ "$dir" != "$default_dir" ] || die "PG_FAST=1 turns off fsync: give the tests a PG_DIR of their own"
data="$dir/data"

port() { cat "$dir/port"; }
url() { echo "postgres://$role:$(cat "$dir/password")@127.0.0.1:$(port)/$database"; }

# pg_ctl status takes a zombie or a reused process id for a live server: look at the command line.
running() {
  local pid
  pid="$(head -n1 "$data/postmaster.pid" 2>/dev/null)" &&
    tr '\0' '\n' 2>/dev/null <"/proc/$pid/cmdline" | grep -qxF -- "$data"
}

# Drop a dead server's pid file, but only once none of its children still works on the data.
clear_stale() {
  local try cwd busy
  [ -e "$data/postmaster.pid" ] || return 0
  for try in $(seq 50); do
    busy=
    for cwd in /proc/[0-9]*/cwd; do [ "$(readlink "$cwd" 2>/dev/null)" = "$data" ] && busy=1; done
    [ -n "$busy" ] || { rm -f "$data/postmaster.pid"; return 0; }
    sleep 0.2
  done
  die "processes of a server that died still use $data"
}

free_port() {
  local try
  for try in $(seq "$1" $(($1 + 60))); do
    (exec 3<>"/dev/tcp/127.0.0.1/$try") 2>/dev/null || { echo "$try"; return 0; }
  done
  die "no free port from $1 to $(($1 + 60))"
}

own_dir() {
  mkdir -p "$dir"
  is_root || return 0
  chown postgres "$dir"
  local parent; parent="$(dirname "$dir")"
  as_server test -x "$parent" || chmod o+x "$parent"
}

# The cluster is made beside its final place and moved there, so that an interrupted start leaves none half made.
create_cluster() {
  [ ! -s "$data/PG_VERSION" ] || return 0
  local locale=C.UTF-8 making="$dir/making"
  locale -a 2>/dev/null | grep -qiE '^C\.utf-?8$' || locale=C
  head -c 24 /dev/urandom | od -An -tx1 | tr -d ' \n' >"$dir/password"
  ! is_root || chown postgres "$dir/password"
  rm -rf "$making"
  as_server "$bin/initdb" -D "$making" -U "$role" -E UTF8 --locale="$locale" --auth=scram-sha-256 \
    --pwfile="$dir/password" --no-sync >"$dir/initdb.log" 2>&1 || die "initdb failed: $(tail -n 20 "$dir/initdb.log")"
  rm -rf "$data"
  mv "$making" "$data"
  [ "${PG_FAST:-}" = 1 ] || sync
}

ask() {
  PGPASSWORD="$(cat "$dir/password")" PGCONNECT_TIMEOUT=10 "$bin/psql" -XqAt -v ON_ERROR_STOP=1 \
    -h 127.0.0.1 -p "$(port)" -U "$role" -d postgres -c "$1"
}

launch() {
  clear_stale
  free_port "${PG_PORT:-54329}" >"$dir/port"
  local options="-c listen_addresses=127.0.0.1 -c port=$(port) -c unix_socket_directories= -c max_connections=100"
  options="$options -c shared_buffers=128MB -c max_parallel_workers_per_gather=0 -c timezone=UTC -c log_timezone=UTC"
  # A foreign connection left idle inside a transaction must not hold locks for ever.
  options="$options -c idle_in_transaction_session_timeout=120s"
  [ "${PG_FAST:-}" != 1 ] || options="$options -c fsync=off -c synchronous_commit=off -c full_page_writes=off -c autovacuum=off"
  as_server "$bin/pg_ctl" -D "$data" -l "$dir/server.log" -o "$options" -w -t 60 start >/dev/null 2>&1 </dev/null ||
    die "the server did not start: $(tail -n 20 "$dir/server.log")"
}

start() {
  [ ! -e "$data" ] || [ "$(stat -c %U "$data")" = "$server_user" ] ||
    die "$data belongs to another user: set PG_DIR, or destroy it as that user"
  own_dir
  exec 9>"$dir/lock"; flock -w 90 9 || die "another start of $dir has not finished"
  create_cluster
  running || launch 9>&-
  [ -n "$(ask "select 1 from pg_database where datname = '$database'")" ] || ask "create database \"$database\""
  url
}

case "${1:-}" in
  start) start ;;
  stop)
    if running; then as_server "$bin/pg_ctl" -D "$data" -m fast -w -t 30 stop >/dev/null; fi
    say stopped ;;
  status)
    running || { say "not running"; exit 3; }
    say "running on 127.0.0.1:$(port), data in $data" ;;
  url) running || die "not running"; url ;;
  where) echo "$dir" ;;
  renew)
    [ "${PG_FAST:-}" = 1 ] || die "renew is for the tests: it deletes the database"
    running || die "not running"
    ask "drop database if exists \"$database\" with (force)"
    ask "create database \"$database\""
    url ;;
  destroy)
    if running; then as_server "$bin/pg_ctl" -D "$data" -m immediate -w stop >/dev/null; fi
    rm -rf "$dir"; say destroyed ;;
  *) die "usage: $0 start|stop|status|url|where|renew|destroy" ;;
esac
