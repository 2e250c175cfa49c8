package optimize

import "context"

func runSimplex(ctx context.Context, s *session, set Settings) error {
	return errExhausted
}
