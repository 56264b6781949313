#Requires -RunAsAdministrator
<#
.SYNOPSIS
  Installs LabWatch as a Windows service, or takes it away again.
.DESCRIPTION
  Publish first:  dotnet publish src/LabWatch.Service -c Release -r win-x64 --self-contained -o C:\LabWatch
  Then:           .\install-service.ps1 -Program C:\LabWatch\labwatch.exe -LabFile C:\LabWatch\lab.json
  The service runs as its own virtual account and keeps its data in ProgramData\labwatch. It starts with the machine and is started
  again when it ends by itself; it stays down when the lab file is wrong (see the Application event log for the findings).
  The first start keeps a code for the set-up in ProgramData\labwatch\set-up-code: open the page /set-up and enter it.
  LabWatch is not a protective device.
.PARAMETER Program
  Full path of labwatch.exe.
.PARAMETER LabFile
  Full path of the lab file.
.PARAMETER Urls
  Where pages and API are served. For other machines https://0.0.0.0:5443 together with -Certificate.
.PARAMETER Certificate
  The word own for a self-signed certificate, or the full path of a PFX or PEM file.
.PARAMETER Remove
  Stops the service and takes it away; the data stay.
#>
param(
  [Parameter(ParameterSetName = 'Install', Mandatory)] [string] $Program,
  [Parameter(ParameterSetName = 'Install', Mandatory)] [string] $LabFile,
  [Parameter(ParameterSetName = 'Install')] [string] $Urls = 'http://127.0.0.1:5080',
  [Parameter(ParameterSetName = 'Install')] [string] $Certificate,
  [Parameter(ParameterSetName = 'Remove', Mandatory)] [switch] $Remove
)
$ErrorActionPreference = 'Stop'
$name = 'LabWatch'
$account = "NT SERVICE\$name"

if ($Remove) {
  if (Get-Service -Name $name -ErrorAction SilentlyContinue) {
    Stop-Service -Name $name
    & sc.exe delete $name | Out-Null
  }
  Write-Host "The service is gone; the data are still in $env:ProgramData\labwatch."
  return
}

foreach ($path in $Program, $LabFile) {
  if (-not (Test-Path -LiteralPath $path -PathType Leaf)) { throw "There is no file $path. Give the full path." }
}

# Wrong input is told now, not in an event log.
if ($Certificate) { $env:LABWATCH__Web__Certificate = $Certificate }
& $Program check-config --lab $LabFile --urls $Urls
if ($LASTEXITCODE -ne 0) { throw 'Lab file or options have findings (above). Correct them first.' }

$data = Join-Path $env:ProgramData 'labwatch'
New-Item -ItemType Directory -Force -Path $data | Out-Null
$command = '"{0}" serve --lab "{1}" --urls {2} --data "{3}"' -f $Program, $LabFile, $Urls, $data
& sc.exe create $name binPath= $command start= delayed-auto obj= $account DisplayName= 'LabWatch' | Out-Null
if ($LASTEXITCODE -ne 0) { throw "The service could not be created (sc.exe says $LASTEXITCODE)." }
& sc.exe description $name 'Watches reference blackbody sources. Not a protective device.' | Out-Null
if ($Certificate) {
  New-ItemProperty -Path "HKLM:\SYSTEM\CurrentControlSet\Services\$name" -Name Environment -PropertyType MultiString -Value "LABWATCH__Web__Certificate=$Certificate" -Force | Out-Null
}
# Start again after 2 s, 10 s, 60 s, also when the process ends with an exit code instead of a crash.
& sc.exe failure $name reset= 86400 actions= restart/2000/restart/10000/restart/60000 | Out-Null
& sc.exe failureflag $name 1 | Out-Null
# The data belong to the service's account and to administrators alone.
& icacls.exe $data /inheritance:r /grant:r "${account}:(OI)(CI)M" 'Administrators:(OI)(CI)F' 'SYSTEM:(OI)(CI)F' | Out-Null
Start-Service -Name $name
Get-Service -Name $name
