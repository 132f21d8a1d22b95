#!/bin/bash
# Runs scenarios/studies/sweep.sbatch on a Slurm of this one machine, started for the purpose and ended afterwards, and
# compares the gathered study with the same study done directly. Needs slurmctld, slurmd, sbatch and munged (Debian:
# slurm-wlm and munge) and a compiled program; exits 2 where one is missing or Slurm does not start here.
set -u

root=$(cd "$(dirname "$0")/../.." && pwd)
program=$root/dist/bin/mesofrost.js
for tool in slurmctld slurmd sbatch squeue sinfo munged munge; do
  PATH=$PATH:/usr/sbin command -v $tool > /dev/null || { echo "not run: $tool is missing" >&2; exit 2; }
done
[ -f "$program" ] || { echo "not run: $program is missing; npm run build" >&2; exit 2; }
PATH=$PATH:/usr/sbin

work=$(mktemp -d)
chmod 755 "$work"
started=()
finish() {
  for process in "${started[@]}"; do kill "$process" 2> /dev/null; done
  sleep 1
  rm -rf "$work"
}
trap finish EXIT

mkdir "$work/munge" "$work/state" "$work/spool"
chmod 700 "$work/munge"
dd if=/dev/urandom of="$work/munge/key" bs=1024 count=1 2> /dev/null
chmod 600 "$work/munge/key"
socket=$work/munge.socket
munged --foreground --force --key-file="$work/munge/key" --socket="$socket" --pid-file="$work/munge/pid" \
  --log-file="$work/munge/log" --seed-file="$work/munge/seed" > "$work/munged.log" 2>&1 &
started+=($!)

host=$(hostname -s)
user=$(id -un)
cores=$(nproc)
memory_MB=$(awk '/MemTotal/ { print int($2 / 1024 * 0.9) }' /proc/meminfo)
export SLURM_CONF=$work/slurm.conf
cat > "$SLURM_CONF" << END
ClusterName=one
SlurmctldHost=$host(127.0.0.1)
SlurmUser=$user
SlurmdUser=$user
SlurmctldPort=16817
SlurmdPort=16818
AuthType=auth/munge
AuthInfo=socket=$socket
ProctrackType=proctrack/pgid
TaskPlugin=task/none
MpiDefault=none
ReturnToService=2
SelectType=select/cons_tres
SelectTypeParameters=CR_Core
StateSaveLocation=$work/state
SlurmdSpoolDir=$work/spool
SlurmctldPidFile=$work/slurmctld.pid
SlurmdPidFile=$work/slurmd.pid
SlurmctldLogFile=$work/slurmctld.log
SlurmdLogFile=$work/slurmd.log
NodeName=$host NodeAddr=127.0.0.1 CPUs=$cores RealMemory=$memory_MB State=UNKNOWN
PartitionName=all Nodes=$host Default=YES MaxTime=INFINITE State=UP
END
sleep 1
slurmctld -D > "$work/slurmctld.out" 2>&1 &
started+=($!)
slurmd -D > "$work/slurmd.out" 2>&1 &
started+=($!)
for _ in $(seq 30); do
  sinfo -h -o %T 2> /dev/null | grep -q idle && break
  sleep 1
done
if ! sinfo -h -o %T 2> /dev/null | grep -q idle; then
  echo "not run: Slurm does not start on this machine" >&2
  tail -5 "$work"/*.out "$work"/slurm*.log "$work"/munged.log >&2
  exit 2
fi

cd "$work" || exit 1
cat > small.yaml << END
title: a small hour or two
duration_h: 2
grid: { levels: 20 }
sizes: { classes: 12 }
END
cat > study.yaml << END
title: a small study
base: small.yaml
axes:
  - key: water.factor
    log: { from: 0.5, to: 2, count: 30 }
END
export MESOFROST="node $program"
$MESOFROST sweep study.yaml --out direct --quiet > /dev/null || exit 1
job=$(sbatch --parsable --array=1-4 --cpus-per-task=1 --mem-per-cpu=0 \
  "$root/scenarios/studies/sweep.sbatch" study.yaml "$work/shared") || exit 1
sbatch --quiet --wait --dependency=afterany:"$job" --output=gather.log \
  --wrap "$MESOFROST sweep-gather $work/shared"
code=$?
cat mesofrost-*.log gather.log
[ $code -eq 0 ] || { echo "failed: gathering ended with $code" >&2; exit 1; }
[ "$(ls shared/members | wc -l)" -eq 4 ] || { echo "failed: not every task wrote its own file" >&2; exit 1; }
for file in members sensitivity; do
  cmp "direct/$file.arrow" "shared/$file.arrow" || exit 1
done
echo 'passed: four array tasks gathered give the bytes of one process'
