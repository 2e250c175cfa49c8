package archive

import "syscall"

// OnNetwork says whether a folder lies on a network file system, as far as the system tells. An archive
// there may be damaged when two machines use it.
func OnNetwork(dir string) bool {
	// Kinds of file systems as statfs(2) lists them.
	const (
		nfs  = 0x6969
		smb  = 0x517b
		smb2 = 0xfe534d42
		cifs = 0xff534d42
		afs  = 0x5346414f
		ceph = 0x00c36400
		p9   = 0x01021997
	)
	var s syscall.Statfs_t
	if syscall.Statfs(dir, &s) != nil {
		return false
	}
	switch uint32(s.Type) {
	case nfs, smb, smb2, cifs, afs, ceph, p9:
		return true
	}
	return false
}
